"use client";

import { useState } from "react";
import { errorWords, ProblemError } from "@/app/_client/request";
import { useCan } from "@/app/_client/use-session";
import type { FieldView } from "@/app/api/v1/fields/schema";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { Notice } from "@/components/ui/status";
import { useToast } from "@/components/ui/toast";
import { useSaveField } from "../_queries/field";
import { FieldFields } from "./field-fields";
import { changesOf, problemsOf, readField, textOfField, type FieldProblems } from "./field-form";

/** Changes what a field is; its address stays, so that links keep working. */
export function EditFieldDialog({ field, onClose }: { field: FieldView; onClose: () => void }) {
  const [text, setText] = useState(() => textOfField(field));
  const [own, setOwn] = useState<FieldProblems>({});
  const save = useSaveField();
  const can = useCan();
  const toast = useToast();
  const isStale = save.error instanceof ProblemError && save.error.status === 412;

  function handleSave() {
    const read = readField(text);
    if (!read.field) return setOwn(read.problems);
    setOwn({});
    const patch = changesOf(read.field, field);
    if (Object.keys(patch).length === 0) return onClose();
    save.mutate(
      { id: field.id, version: field.version, patch },
      {
        onSuccess: () => {
          toast({ title: `${text.name.trim()} is saved` });
          onClose();
        },
      },
    );
  }

  return (
    <Dialog
      open
      onClose={onClose}
      width={760}
      title={`Edit ${field.name}`}
      description="Figures of the portfolio follow at once; the change is kept in the audit trail."
      actions={
        <>
          <Button onClick={onClose}>Cancel</Button>
          <Button kind="primary" busy={save.isPending} busyLabel="Saving…" onClick={handleSave}>
            Save
          </Button>
        </>
      }
    >
      <div className="grid gap-3">
        <FieldFields
          text={text}
          problems={{ ...problemsOf(save.error), ...own }}
          mayEditCommercial={can("field.updateCommercial")}
          onChange={setText}
        />
        {save.error && (
          <Notice
            tone="error"
            title={isStale ? "Somebody else changed this field meanwhile." : "Not saved."}
          >
            {isStale
              ? "Close, look at what they changed, and edit again. Nothing of theirs was overwritten."
              : errorWords(save.error)}
          </Notice>
        )}
      </div>
    </Dialog>
  );
}
