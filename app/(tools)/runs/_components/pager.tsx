import { Button } from "@/components/ui/button";

export interface PagerProps {
  total: number;
  offset: number;
  step: number;
  /** "runs" */
  noun: string;
  onPage: (offset: number) => void;
}

/** Backwards and forwards through a long list; nothing when it fits on one page. */
export function Pager({ total, offset, step, noun, onPage }: PagerProps) {
  if (total <= step) return null;
  const whole = (count: number) => count.toLocaleString("en-GB");
  return (
    <nav className="pager" aria-label={`Pages of ${noun}`}>
      <Button
        size="small"
        disabled={offset === 0}
        onClick={() => onPage(Math.max(0, offset - step))}
      >
        Previous
      </Button>
      <span>
        {whole(offset + 1)} to {whole(Math.min(offset + step, total))} of {whole(total)} {noun}
      </span>
      <Button size="small" disabled={offset + step >= total} onClick={() => onPage(offset + step)}>
        Next
      </Button>
    </nav>
  );
}
