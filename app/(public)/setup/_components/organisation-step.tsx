"use client";

import { useState } from "react";
import { useForm } from "react-hook-form";
import { placeProblems } from "@/app/_client/form-problems";
import { request } from "@/app/_client/request";
import { settingsSchema } from "@/app/api/v1/settings/schema";
import { Button } from "@/components/ui/button";
import { TextField } from "@/components/ui/field";
import { Notice } from "@/components/ui/status";

interface Organisation {
  organisationName: string;
}

export interface OrganisationStepProps {
  name: string;
  onDone: (name: string) => void;
}

export function OrganisationStep({ name, onDone }: OrganisationStepProps) {
  const [problem, setProblem] = useState<string | null>(null);
  const { register, handleSubmit, setError, formState } = useForm<Organisation>({
    defaultValues: { organisationName: name },
  });
  const { errors, isSubmitting } = formState;

  async function handleOrganisation(body: Organisation) {
    setProblem(null);
    try {
      const { version } = await request("/api/v1/settings", { schema: settingsSchema });
      const saved = await request("/api/v1/settings", {
        method: "PATCH",
        version,
        body,
        schema: settingsSchema,
      });
      onDone(saved.organisationName);
    } catch (error) {
      setProblem(placeProblems(error, setError, ["organisationName"]));
    }
  }

  return (
    <form method="post" noValidate onSubmit={handleSubmit(handleOrganisation)}>
      {problem && <Notice tone="error" title={problem} />}
      <TextField
        label="Name of the organisation"
        autoComplete="organization"
        autoFocus
        hint="“Net” means net to this organisation, everywhere in the book."
        error={errors.organisationName?.message}
        {...register("organisationName", { required: "Give the organisation a name." })}
      />
      <p className="field-hint mt-3">
        Gas is kept at 14.696 psia and 60 °F, condensate in stock-tank barrels. Each page can show
        other units and other standard conditions.
      </p>
      <Button type="submit" kind="primary" className="mt-4" busy={isSubmitting}>
        Save and go on
      </Button>
    </form>
  );
}
