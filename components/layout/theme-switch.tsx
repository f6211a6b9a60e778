"use client";

import { IconButton } from "@/components/ui/button";
import { chooseTheme } from "./theme";

/** Light or dark; the choice is remembered on this device and beats the system's. */
export function ThemeSwitch() {
  function handleClick() {
    chooseTheme(document.documentElement.dataset.theme === "dark" ? "light" : "dark");
  }
  return <IconButton icon="moon" label="Switch between light and dark" onClick={handleClick} />;
}
