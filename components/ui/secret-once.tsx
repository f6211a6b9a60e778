"use client";

import { useState } from "react";
import { Button } from "./button";

/** Something that is shown this once: it is stored nowhere in a form that anybody could read. */
export function SecretOnce({ secret }: { secret: string }) {
  const [copied, setCopied] = useState<boolean | null>(null);

  async function handleCopy() {
    try {
      await navigator.clipboard.writeText(secret);
      setCopied(true);
    } catch {
      // The clipboard may be closed to us; the secret is there to be selected.
      setCopied(false);
    }
  }

  return (
    <>
      <p className="secret">
        <code>{secret}</code>
        <Button size="small" onClick={() => void handleCopy()}>
          Copy
        </Button>
      </p>
      <p className="field-hint" role="status">
        {copied === true && "Copied. "}
        {copied === false && "It could not be copied: select it and copy it yourself. "}
        It is not shown again.
      </p>
    </>
  );
}
