import type { ReactNode } from "react";
import { Icon, type IconName } from "./icon";

/** Read out, not shown. */
export const VisuallyHidden = ({ children }: { children: ReactNode }) => (
  <span className="sr-only">{children}</span>
);

/** A unit: smaller and softer than its figure. */
export const Unit = ({ children }: { children: ReactNode }) => (
  <span className="unit">{children}</span>
);

/** Something a reviewer would ask about. `plain` for facts that are no warning. */
export function Flag({
  children,
  icon,
  tone = "warning",
  title,
}: {
  children: ReactNode;
  icon?: IconName;
  tone?: "warning" | "plain";
  title?: string;
}) {
  return (
    <span className={tone === "plain" ? "flag flag-plain" : "flag"} title={title}>
      {icon && <Icon name={icon} />}
      <span>{children}</span>
    </span>
  );
}

const states = {
  approved: { icon: "tick", word: "Approved" },
  draft: { icon: "pencil", word: "Draft" },
  submitted: { icon: "up", word: "Submitted" },
  returned: { icon: "return", word: "Returned" },
  superseded: { icon: "superseded", word: "Superseded" },
} as const satisfies Record<string, { icon: IconName; word: string }>;

export type State = keyof typeof states;

/**
 * State of a revision. What is normal stays quiet: approved is a tick and "r4"; what waits gets its
 * word. `worded` writes the word for approved too.
 */
export function StateMark({
  state,
  revision,
  worded = state !== "approved",
}: {
  state: State;
  revision?: number;
  worded?: boolean;
}) {
  const { icon, word } = states[state];
  return (
    <span className="state-mark" data-state={state} data-worded={worded || undefined}>
      <Icon name={icon} />
      {worded ? word : <VisuallyHidden>{word}</VisuallyHidden>}
      {revision !== undefined && ` r${revision}`}
    </span>
  );
}

/** A class drawn as a full, half or empty disc with its word. */
export function ClassMark({
  fill,
  children,
}: {
  fill: "full" | "half" | "empty";
  children: ReactNode;
}) {
  return (
    <span className="class-mark" data-fill={fill}>
      <i aria-hidden="true" />
      {children}
    </span>
  );
}
