"use client";

import { useMutation } from "@tanstack/react-query";
import { signOut } from "next-auth/react";
import { useState } from "react";
import { z } from "zod";
import { errorWords, request } from "@/app/_client/request";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { Notice } from "@/components/ui/status";

export function SignOutEverywhere() {
  const [isAsking, setIsAsking] = useState(false);
  const end = useMutation({
    mutationFn: () => request("/api/v1/session", { method: "DELETE", schema: z.undefined() }),
    onSuccess: () => signOut({ callbackUrl: "/sign-in" }),
  });
  return (
    <>
      <Button onClick={() => setIsAsking(true)}>Sign out everywhere</Button>
      <Dialog
        open={isAsking}
        onClose={() => setIsAsking(false)}
        title="Sign out everywhere?"
        description="Every session of yours ends, on this device too, and every API token is revoked. Programs need new ones."
        actions={
          <>
            <Button onClick={() => setIsAsking(false)}>Cancel</Button>
            <Button kind="primary" busy={end.isPending} onClick={() => end.mutate()}>
              Sign out everywhere
            </Button>
          </>
        }
      >
        {end.error && <Notice tone="error" title={errorWords(end.error)} />}
      </Dialog>
    </>
  );
}
