/** What this device shows: a remembered choice, or what the system says. */
export type Theme = "light" | "dark" | "system";

/** The first script of every page reads the same key before anything is drawn. */
const STORAGE = "theme";
const CHANGED = "dewledger-theme";

export function rememberedTheme(): Theme {
  try {
    const theme = localStorage.getItem(STORAGE);
    return theme === "light" || theme === "dark" ? theme : "system";
  } catch {
    // Storage may be closed to us: then nothing is remembered.
    return "system";
  }
}

/** Shows a theme, without remembering it. */
export function applyTheme(theme: Theme): void {
  const isDark =
    theme === "dark" ||
    (theme === "system" && window.matchMedia("(prefers-color-scheme: dark)").matches);
  document.documentElement.dataset.theme = isDark ? "dark" : "light";
}

/** Shows a theme and remembers it on this device. */
export function chooseTheme(theme: Theme): void {
  applyTheme(theme);
  try {
    if (theme === "system") localStorage.removeItem(STORAGE);
    else localStorage.setItem(STORAGE, theme);
  } catch {
    // The choice then lasts as long as the page.
  }
  window.dispatchEvent(new Event(CHANGED));
}

/** Calls `listener` whenever another theme is chosen, here or in another tab. */
export function subscribeToTheme(listener: () => void): () => void {
  window.addEventListener("storage", listener);
  window.addEventListener(CHANGED, listener);
  return () => {
    window.removeEventListener("storage", listener);
    window.removeEventListener(CHANGED, listener);
  };
}
