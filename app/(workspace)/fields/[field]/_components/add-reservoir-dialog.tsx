"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { errorWords } from "@/app/_client/request";
import type { FieldView } from "@/app/api/v1/fields/schema";
import { useBasis } from "@/components/basis/use-basis";
import { readQuantity } from "@/components/estimate/quantities-of-inputs";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { NumberField, TextField } from "@/components/ui/field";
import { Notice } from "@/components/ui/status";
import { useCreateReservoir } from "../_queries/field";

/** A name and a depth make a reservoir; its ranges are typed on its own page. */
export function AddReservoirDialog({ field, onClose }: { field: FieldView; onClose: () => void }) {
  const { withBasis } = useBasis();
  const router = useRouter();
  const [name, setName] = useState("");
  const [depth, setDepth] = useState("");
  const create = useCreateReservoir();
  const read = readQuantity(depth, "length", "ft");
  const isReady = name.trim() !== "" && read.problem === null;

  function handleAdd() {
    create.mutate(
      { fieldId: field.id, name: name.trim(), depthFt: read.value },
      {
        onSuccess: ({ slug }) => router.push(withBasis(`/fields/${field.slug}/${slug}`)),
      },
    );
  }

  return (
    <Dialog
      open
      onClose={onClose}
      title={`Add a reservoir to ${field.name}`}
      actions={
        <>
          <Button onClick={onClose}>Cancel</Button>
          <Button
            kind="primary"
            busy={create.isPending || create.isSuccess}
            busyLabel="Adding…"
            disabled={!isReady}
            onClick={handleAdd}
          >
            Add and enter its ranges
          </Button>
        </>
      }
    >
      <div className="grid gap-3">
        <TextField
          label="Name"
          hint="As its people call it, such as “Upper sand”"
          maxLength={120}
          value={name}
          onChange={(event) => setName(event.target.value)}
        />
        <NumberField
          label="Depth"
          unit="ft"
          hint="Subsea or below mudline; may stay empty. Used for warnings about gradients only."
          preview={read.preview}
          error={read.problem ?? undefined}
          value={depth}
          onChange={(event) => setDepth(event.target.value)}
        />
        {create.error && (
          <Notice tone="error" title="The reservoir was not added.">
            {errorWords(create.error)}
          </Notice>
        )}
      </div>
    </Dialog>
  );
}
