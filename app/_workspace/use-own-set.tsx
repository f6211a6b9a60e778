"use client";

import { ProblemError } from "@/app/_client/request";
import { useBasis } from "@/components/basis/use-basis";
import { Button } from "@/components/ui/button";

/** The way back when the basis names a dependence set that is gone; nothing for any other failure. */
export function UseOwnSet({ error }: { error: unknown }) {
  const { basis, setBasis } = useBasis();
  const isGone =
    error instanceof ProblemError &&
    error.status === 404 &&
    basis.dependence !== "default" &&
    error.message.includes("dependence set");
  if (!isGone) return null;
  return (
    <Button size="small" kind="primary" onClick={() => setBasis({ dependence: "default" })}>
      Use the book’s own set
    </Button>
  );
}
