import type { ReactNode } from "react";
import { Icon, type IconName } from "@/components/ui/icon";

export interface Finding {
  tone: "done" | "warning" | "open" | "caution";
  title?: ReactNode;
  text: ReactNode;
}

const icons: Record<Finding["tone"], { name: IconName; word: string }> = {
  done: { name: "tick", word: "In order: " },
  warning: { name: "warning", word: "To look at: " },
  open: { name: "clock", word: "To do: " },
  caution: { name: "warning", word: "Caution: " },
};

/** Checks and their outcomes, one a line. */
export function FindingList({ findings }: { findings: readonly Finding[] }) {
  return (
    <ul className="finding-list">
      {findings.map(({ tone, title, text }, index) => (
        <li key={index} data-tone={tone}>
          <Icon name={icons[tone].name} size={13} />
          <span>
            <span className="sr-only">{icons[tone].word}</span>
            {title && <b>{title}</b>}
            {text}
          </span>
        </li>
      ))}
    </ul>
  );
}
