"use client";

import { useSyncExternalStore } from "react";
import { Segmented } from "@/components/ui/choice";

type Theme = "light" | "dark" | "system";

const STORAGE = "theme";
const CHANGED = "dewledger-theme";

function remembered(): Theme {
  try {
    const theme = localStorage.getItem(STORAGE);
    return theme === "light" || theme === "dark" ? theme : "system";
  } catch {
    // Storage may be closed to us: then nothing is remembered.
    return "system";
  }
}

function subscribe(listener: () => void) {
  // `storage` tells of other tabs, our own event of this one.
  window.addEventListener("storage", listener);
  window.addEventListener(CHANGED, listener);
  return () => {
    window.removeEventListener("storage", listener);
    window.removeEventListener(CHANGED, listener);
  };
}

function choose(theme: Theme) {
  const isDark =
    theme === "dark" ||
    (theme === "system" && window.matchMedia("(prefers-color-scheme: dark)").matches);
  document.documentElement.dataset.theme = isDark ? "dark" : "light";
  try {
    if (theme === "system") localStorage.removeItem(STORAGE);
    else localStorage.setItem(STORAGE, theme);
  } catch {
    // The choice then lasts as long as the page.
  }
  window.dispatchEvent(new Event(CHANGED));
}

/** The theme of this device; the app's first script reads the same key before anything is drawn. */
export function ThemeChoice() {
  const theme = useSyncExternalStore(subscribe, remembered, () => null);
  return (
    <Segmented<Theme>
      label="Light or dark"
      value={theme}
      options={[
        { value: "light", label: "Light" },
        { value: "dark", label: "Dark" },
        { value: "system", label: "As the system" },
      ]}
      onChange={choose}
    />
  );
}
