import type { ReactNode } from "react";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/status";
import { errorWords } from "./request";

export interface ReadErrorProps {
  error: unknown;
  onRetry: () => unknown;
  /** what was kept, in a sentence */
  children: ReactNode;
}

/** In the place of what could not be read: what happened, what was kept, and the way to try again. */
export function ReadError({ error, onRetry, children }: ReadErrorProps) {
  return (
    <Notice
      tone="error"
      title={errorWords(error)}
      actions={
        <Button size="small" onClick={() => void onRetry()}>
          Try again
        </Button>
      }
    >
      {children}
    </Notice>
  );
}
