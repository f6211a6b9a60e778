"use client";

import { useSyncExternalStore } from "react";
import {
  chooseTheme,
  rememberedTheme,
  subscribeToTheme,
  type Theme,
} from "@/components/layout/theme";
import { Segmented } from "@/components/ui/choice";

export function ThemeChoice() {
  const theme = useSyncExternalStore(subscribeToTheme, rememberedTheme, () => null);
  return (
    <Segmented<Theme>
      label="Light or dark"
      value={theme}
      options={[
        { value: "light", label: "Light" },
        { value: "dark", label: "Dark" },
        { value: "system", label: "As the system" },
      ]}
      onChange={chooseTheme}
    />
  );
}
