"use client";

import { useState } from "react";
import { ReadError } from "@/app/_client/read-error";
import { errorWords } from "@/app/_client/request";
import type { ApiTokenView } from "@/app/api/v1/api-tokens/schema";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { TextField } from "@/components/ui/field";
import { formatDate } from "@/components/ui/format";
import { Section } from "@/components/ui/section";
import { Notice, Skeleton } from "@/components/ui/status";
import { LedgerTable } from "@/components/ui/table";
import { useApiTokens, useCreateToken, useRevokeToken } from "../_queries/api-tokens";

/** The person's tokens: made here, shown once, revoked here. */
export function TokenSection() {
  const { data, error, isPending, refetch } = useApiTokens();
  const [revoking, setRevoking] = useState<ApiTokenView | null>(null);
  const live = data?.items.filter(({ revokedAt }) => revokedAt === null) ?? [];
  return (
    <Section
      title={tokensTitle(data ? live.length : null)}
      note="A token acts as you. Give each script its own, so that one can be revoked without the others."
    >
      <div className="grid grid-cols-1 gap-4">
        <NewToken />
        {isPending && <Skeleton lines={3} label="Loading your tokens" />}
        {!isPending && !data && (
          <ReadError error={error} onRetry={refetch}>
            Your tokens work as before; only this list could not be read.
          </ReadError>
        )}
        {live.length > 0 && <TokenTable tokens={live} onRevoke={setRevoking} />}
      </div>
      {revoking && <RevokeDialog token={revoking} onClose={() => setRevoking(null)} />}
    </Section>
  );
}

function tokensTitle(live: number | null): string {
  if (live === null) return "Your tokens";
  if (live === 0) return "You have no token yet";
  return live === 1 ? "One token acts for you" : `${live} tokens act for you`;
}

function NewToken() {
  const create = useCreateToken();
  const [name, setName] = useState("");
  const [copied, setCopied] = useState(false);
  const made = create.data;

  async function handleCopy(token: string) {
    try {
      await navigator.clipboard.writeText(token);
      setCopied(true);
    } catch {
      // The clipboard may be closed to us; the token stands on the screen to be selected.
    }
  }

  return (
    <div className="grid grid-cols-1 gap-3">
      <form
        className="flex flex-wrap items-end gap-2"
        onSubmit={(event) => {
          event.preventDefault();
          setCopied(false);
          create.mutate(name, { onSuccess: () => setName("") });
        }}
      >
        <TextField
          className="w-72"
          label="Name of the script or machine"
          value={name}
          maxLength={120}
          error={create.error ? errorWords(create.error) : undefined}
          onChange={(event) => setName(event.target.value)}
        />
        <Button type="submit" kind="primary" busy={create.isPending} disabled={name.trim() === ""}>
          Make a token
        </Button>
      </form>
      {made && (
        <Notice
          tone="success"
          title={`Token “${made.name}”. It is shown this once; keep it somewhere safe.`}
          live
          actions={
            <Button size="small" onClick={() => void handleCopy(made.token)}>
              {copied ? "Copied" : "Copy"}
            </Button>
          }
        >
          <code className="mt-1 block select-all break-all font-mono text-13">{made.token}</code>
        </Notice>
      )}
    </div>
  );
}

function TokenTable({
  tokens,
  onRevoke,
}: {
  tokens: readonly ApiTokenView[];
  onRevoke: (token: ApiTokenView) => void;
}) {
  return (
    <LedgerTable caption="Your live tokens">
      <thead>
        <tr>
          <th scope="col">Name</th>
          <th scope="col">Made</th>
          <th scope="col">Last used</th>
          <th scope="col">
            <span className="sr-only">Action</span>
          </th>
        </tr>
      </thead>
      <tbody>
        {tokens.map((token) => (
          <tr key={token.id}>
            <th scope="row" className="wrap">
              {token.name}
            </th>
            <td>{formatDate(token.createdAt)}</td>
            <td>{token.lastUsedAt ? formatDate(token.lastUsedAt) : "never"}</td>
            <td className="right">
              <Button
                kind="quiet"
                size="small"
                aria-label={`Revoke ${token.name}`}
                onClick={() => onRevoke(token)}
              >
                Revoke
              </Button>
            </td>
          </tr>
        ))}
      </tbody>
    </LedgerTable>
  );
}

function RevokeDialog({ token, onClose }: { token: ApiTokenView; onClose: () => void }) {
  const revoke = useRevokeToken();
  return (
    <Dialog
      open
      onClose={onClose}
      title={`Revoke “${token.name}”?`}
      description="Scripts that use it stop working at once. This cannot be undone; a new token can be made."
      actions={
        <>
          <Button onClick={onClose}>Keep it</Button>
          <Button
            kind="primary"
            busy={revoke.isPending}
            onClick={() => revoke.mutate(token.id, { onSuccess: onClose })}
          >
            Revoke
          </Button>
        </>
      }
    >
      {revoke.error && <Notice tone="error" title={errorWords(revoke.error)} />}
    </Dialog>
  );
}
