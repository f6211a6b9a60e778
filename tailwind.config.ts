import type { Config } from "tailwindcss";
import forms from "@tailwindcss/forms";
import headlessui from "@headlessui/tailwindcss";

/** A colour token of app/globals.css, with Tailwind's opacity modifiers kept working. */
const token = (name: string) =>
  `color-mix(in srgb, var(--${name}) calc(<alpha-value> * 100%), transparent)`;

const tokens = (...names: string[]) => Object.fromEntries(names.map((name) => [name, token(name)]));

/** Tremor's own theme keys, pointed at our tokens: one set serves both themes. */
const tremor = {
  brand: {
    faint: token("petrol-wash"),
    muted: token("petrol-wash"),
    subtle: token("petrol"),
    DEFAULT: token("petrol"),
    emphasis: token("ink"),
    inverted: token("on-petrol"),
  },
  background: {
    muted: token("band"),
    subtle: token("basis"),
    DEFAULT: token("sheet"),
    emphasis: token("ink-soft"),
  },
  border: { DEFAULT: token("field") },
  ring: { DEFAULT: token("petrol") },
  content: {
    subtle: token("ink-soft"),
    DEFAULT: token("ink-soft"),
    emphasis: token("ink"),
    strong: token("ink"),
    inverted: token("paper"),
  },
};

const config: Config = {
  content: [
    "./app/**/*.tsx",
    "./components/**/*.{ts,tsx}",
    "./node_modules/@tremor/react/dist/**/*.{js,mjs}",
  ],
  darkMode: ["selector", '[data-theme="dark"]'],
  theme: {
    fontFamily: {
      serif: ["var(--font-serif)", "Georgia", "serif"],
      sans: ["var(--font-sans)", "Segoe UI", "sans-serif"],
      mono: ["ui-monospace", "DejaVu Sans Mono", "monospace"],
    },
    fontSize: {
      12: ["0.75rem", "1.35"],
      13: ["0.8125rem", "1.4"],
      14: ["0.875rem", "1.45"],
      16: ["1rem", "1.4"],
      20: ["1.25rem", "1.22"],
      26: ["1.625rem", "1.22"],
      34: ["2.125rem", "1.12"],
      44: ["2.75rem", "1.1"],
      60: ["3.75rem", "1"],
      "tremor-label": ["0.75rem", "1rem"],
      "tremor-default": ["0.8125rem", "1.125rem"],
      "tremor-title": ["1.25rem", "1.5rem"],
      "tremor-metric": ["2.125rem", "2.375rem"],
    },
    extend: {
      screens: {
        phone: { max: "820px" },
        narrow: { max: "1100px" },
        side: { max: "1240px" },
      },
      colors: {
        ...tokens("paper", "basis", "sheet", "band", "rule", "rule-strong", "field"),
        ...tokens("ink", "ink-soft", "petrol", "petrol-wash", "on-petrol", "margin"),
        ...tokens("condensate", "condensate-wash", "gas", "gas-wash", "ngl", "ngl-wash"),
        ...tokens("rock", "rock-wash", "positive", "positive-wash"),
        ...tokens("warning", "warning-ink", "warning-wash"),
        tremor,
        "dark-tremor": tremor,
      },
      borderRadius: {
        DEFAULT: "2px",
        "tremor-small": "2px",
        "tremor-default": "2px",
        "tremor-full": "9999px",
      },
      boxShadow: {
        float: "var(--shadow)",
        "tremor-input": "none",
        "tremor-card": "none",
        "tremor-dropdown": "var(--shadow)",
        "dark-tremor-input": "none",
        "dark-tremor-card": "none",
        "dark-tremor-dropdown": "var(--shadow)",
      },
      maxWidth: { page: "1288px", "page-wide": "1720px" },
      height: { row: "var(--row)" },
    },
  },
  // Tremor writes chart colours as class names built at run time.
  safelist: [
    {
      pattern: /^(bg|fill|stroke|text)-(condensate|gas|ngl|rock|positive|petrol|ink|ink-soft)$/,
    },
  ],
  plugins: [forms({ strategy: "class" }), headlessui],
};

export default config;
