"use client";

import { IconButton } from "@/components/ui/button";

/** Light or dark; the choice is remembered on this device and beats the system's. */
export function ThemeSwitch() {
  function handleClick() {
    const root = document.documentElement;
    const theme = root.dataset.theme === "dark" ? "light" : "dark";
    root.dataset.theme = theme;
    try {
      localStorage.setItem("theme", theme);
    } catch {
      // Storage may be closed to us (private windows): the choice then lasts as long as the page.
    }
  }
  return <IconButton icon="moon" label="Switch between light and dark" onClick={handleClick} />;
}
