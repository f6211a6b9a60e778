"use client";

import { useMutation, useQuery, useQueryClient } from "@tanstack/react-query";
import { useState, type FormEvent } from "react";
import { z } from "zod";
import { errorWords, request } from "@/app/_client/request";
import {
  apiTokensSchema,
  newApiTokenAnswerSchema,
  type ApiTokenView,
} from "@/app/api/v1/api-tokens/schema";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { TextField } from "@/components/ui/field";
import { formatDate } from "@/components/ui/format";
import { SecretOnce } from "@/components/ui/secret-once";
import { EmptyState, Notice, Skeleton } from "@/components/ui/status";
import { ColumnHeading, LedgerTable } from "@/components/ui/table";

const key = ["api-tokens"];

/** One's own tokens: made here, shown once, revoked here. */
export function ApiTokens() {
  const client = useQueryClient();
  const [isNaming, setIsNaming] = useState(false);
  const refresh = () => client.invalidateQueries({ queryKey: key });
  const { data, error } = useQuery({
    queryKey: key,
    queryFn: ({ signal }) => request("/api/v1/api-tokens", { schema: apiTokensSchema, signal }),
  });
  const revoke = useMutation({
    mutationFn: (id: string) =>
      request(`/api/v1/api-tokens/${id}`, { method: "DELETE", schema: z.unknown() }),
    onSuccess: refresh,
  });
  const live = data?.items.filter(({ revokedAt }) => revokedAt === null) ?? [];
  const make = <Button onClick={() => setIsNaming(true)}>Make a token</Button>;
  const failure = error ?? revoke.error;
  return (
    <div className="form-grid">
      {failure && <Notice tone="error" title={errorWords(failure)} />}
      {!data && !error && <Skeleton lines={3} label="Loading your tokens" />}
      {data && live.length === 0 && (
        <EmptyState title="No program works under your name" action={make}>
          A budgeting system can fetch its file with a token instead of your password.
        </EmptyState>
      )}
      {live.length > 0 && (
        <>
          <TokenTable
            tokens={live}
            busyId={revoke.isPending ? revoke.variables : undefined}
            onRevoke={(id) => revoke.mutate(id)}
          />
          <div>{make}</div>
        </>
      )}
      {isNaming && <NewTokenDialog onClose={() => setIsNaming(false)} onMade={refresh} />}
    </div>
  );
}

interface TokenTableProps {
  tokens: readonly ApiTokenView[];
  busyId: string | undefined;
  onRevoke: (id: string) => void;
}

function TokenTable({ tokens, busyId, onRevoke }: TokenTableProps) {
  return (
    <LedgerTable caption="Your API tokens" framed className="stacking-table">
      <thead>
        <tr>
          <ColumnHeading>Name</ColumnHeading>
          <ColumnHeading align="right">Revoke</ColumnHeading>
          <ColumnHeading>Made</ColumnHeading>
          <ColumnHeading>Last used</ColumnHeading>
        </tr>
      </thead>
      <tbody>
        {tokens.map(({ id, name, createdAt, lastUsedAt }) => (
          <tr key={id}>
            <th scope="row" className="wrap">
              {name}
            </th>
            <td className="right">
              <Button
                size="small"
                aria-label={`Revoke ${name}`}
                busy={busyId === id}
                onClick={() => onRevoke(id)}
              >
                Revoke
              </Button>
            </td>
            <td data-label="Made">{formatDate(createdAt)}</td>
            <td data-label="Last used">{lastUsedAt ? formatDate(lastUsedAt, "time") : "never"}</td>
          </tr>
        ))}
      </tbody>
    </LedgerTable>
  );
}

function NewTokenDialog({ onClose, onMade }: { onClose: () => void; onMade: () => void }) {
  const [name, setName] = useState("");
  const make = useMutation({
    mutationFn: () =>
      request("/api/v1/api-tokens", {
        method: "POST",
        body: { name },
        schema: newApiTokenAnswerSchema,
      }),
    onSuccess: onMade,
  });

  function handleSubmit(event: FormEvent) {
    event.preventDefault();
    make.mutate();
  }

  if (make.data) {
    return (
      <Dialog
        open
        onClose={onClose}
        title={`The token ${make.data.name}`}
        description="Send it as: Authorization: Bearer, a space, the token."
        actions={
          <Button kind="primary" onClick={onClose}>
            Done
          </Button>
        }
      >
        <div className="mt-3">
          <SecretOnce secret={make.data.token} />
        </div>
      </Dialog>
    );
  }
  return (
    <Dialog
      open
      onClose={onClose}
      title="Make a token"
      actions={
        <>
          <Button onClick={onClose}>Cancel</Button>
          <Button kind="primary" type="submit" form="new-token" busy={make.isPending}>
            Make it
          </Button>
        </>
      }
    >
      <form id="new-token" noValidate onSubmit={handleSubmit}>
        <TextField
          label="What it is for"
          hint="Such as: budgeting system, nightly file."
          value={name}
          error={make.error ? errorWords(make.error) : undefined}
          onChange={(event) => setName(event.target.value)}
        />
      </form>
    </Dialog>
  );
}
