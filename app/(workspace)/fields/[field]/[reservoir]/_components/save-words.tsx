"use client";

import type { SaveState } from "../_editor/use-draft";

const words: Record<Exclude<SaveState["kind"], "failed">, string> = {
  saved: "Saved",
  waiting: "Saving…",
  saving: "Saving…",
  kept: "Kept in this browser until it can be saved",
  conflict: "Somebody else saved first",
};

/** How the draft stands with the server, announced as it changes. */
export function SaveWords({ state }: { state: SaveState }) {
  return <span role="status">{state.kind === "failed" ? "Not saved" : words[state.kind]}</span>;
}
