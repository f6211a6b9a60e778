"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { errorWords } from "@/app/_client/request";
import { useCan, useSession } from "@/app/_client/use-session";
import { useBasis } from "@/components/basis/use-basis";
import { Button, LinkButton } from "@/components/ui/button";
import { Page, PageHead, Section } from "@/components/ui/section";
import { Notice } from "@/components/ui/status";
import { useSaveField } from "../_queries/field";
import { FieldFields } from "./field-fields";
import { problemsOf, readField, textOfField, type FieldProblems } from "./field-form";

/** Enters a field into the book; its reservoirs are added on its own page. */
export function NewField() {
  const { withBasis } = useBasis();
  const router = useRouter();
  const session = useSession();
  const can = useCan();
  const [text, setText] = useState(() => textOfField(null));
  const [own, setOwn] = useState<FieldProblems>({});
  const save = useSaveField();
  const mayNot = session.isSuccess && !can("field.create");

  function handleSave() {
    const read = readField(text);
    if (!read.field) return setOwn(read.problems);
    setOwn({});
    save.mutate(
      { field: read.field },
      { onSuccess: ({ slug }) => router.push(withBasis(`/fields/${slug}`)) },
    );
  }

  return (
    <Page>
      <PageHead
        crumbs={[{ label: "Fields", href: withBasis("/fields") }, { label: "New field" }]}
        title="New field"
        lead="What the field is and what share of it is the company’s. Its reservoirs come next."
      />
      {mayNot ? (
        <Notice tone="info" title="Your role does not enter fields.">
          An engineer or a planner does.
        </Notice>
      ) : (
        <Section title="The field">
          <form
            className="grid max-w-[820px] gap-4"
            onSubmit={(event) => {
              event.preventDefault();
              handleSave();
            }}
          >
            <FieldFields
              text={text}
              problems={{ ...problemsOf(save.error), ...own }}
              mayEditCommercial
              onChange={setText}
            />
            {Object.keys(own).length > 0 && (
              <Notice tone="error" title="Some fields need attention.">
                The reasons stand beside them.
              </Notice>
            )}
            {save.error && (
              <Notice tone="error" title="The field was not saved.">
                {errorWords(save.error)}
              </Notice>
            )}
            <div className="flex gap-2">
              <Button
                type="submit"
                kind="primary"
                busy={save.isPending || save.isSuccess}
                busyLabel="Saving…"
              >
                Save the field
              </Button>
              <LinkButton href={withBasis("/fields")}>Cancel</LinkButton>
            </div>
          </form>
        </Section>
      )}
    </Page>
  );
}
