"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { useForm } from "react-hook-form";
import { placeProblems } from "@/app/_client/form-problems";
import { request } from "@/app/_client/request";
import { basinSchema } from "@/app/api/v1/basins/schema";
import { fieldSchema, type NewFieldRequest } from "@/app/api/v1/fields/schema";
import { Button, LinkButton } from "@/components/ui/button";
import { TextField } from "@/components/ui/field";
import { Notice } from "@/components/ui/status";

interface FirstField {
  basin: string;
  name: string;
  operator: string;
  workingPercent: string;
  netPercent: string;
}

const isPercent = (text: string) =>
  (text.trim() !== "" && Number(text) >= 0 && Number(text) <= 100) ||
  "Give a percentage from 0 to 100.";

/** The first basin and field. Skipping is fine: every list offers it again. */
export function FieldStep({ operator }: { operator: string }) {
  const router = useRouter();
  const [problem, setProblem] = useState<string | null>(null);
  const [basin, setBasin] = useState<{ id: string; name: string } | null>(null);
  const { register, handleSubmit, setError, formState } = useForm<FirstField>({
    defaultValues: { operator, workingPercent: "100", netPercent: "100" },
  });
  const { errors, isSubmitting } = formState;

  /** A basin that was made before the field was refused is not made twice. */
  async function basinNamed(name: string) {
    if (basin?.name === name) return basin;
    const made = await request("/api/v1/basins", {
      method: "POST",
      body: { name },
      schema: basinSchema,
    });
    setBasin({ id: made.id, name });
    return made;
  }

  async function handleField(first: FirstField) {
    setProblem(null);
    try {
      const { id } = await basinNamed(first.basin.trim());
      const body: NewFieldRequest = {
        name: first.name,
        basinId: id,
        operator: first.operator,
        workingInterest: Number(first.workingPercent) / 100,
        netRevenueInterest: Number(first.netPercent) / 100,
        prmsClass: "contingent",
        prmsSubClass: "development_unclarified",
        chanceOfCommerciality: 1,
      };
      const field = await request("/api/v1/fields", { method: "POST", body, schema: fieldSchema });
      router.push(`/fields/${field.slug}`);
    } catch (error) {
      setProblem(placeProblems(error, setError, ["name", "operator"]));
    }
  }

  return (
    <form method="post" noValidate onSubmit={handleSubmit(handleField)}>
      {problem && <Notice tone="error" title={problem} />}
      <TextField
        label="Basin"
        autoFocus
        hint="Fields of one basin share a basin’s geology, and move together in totals."
        error={errors.basin?.message}
        {...register("basin", { required: "Name the basin." })}
      />
      <TextField
        label="Field"
        error={errors.name?.message}
        {...register("name", { required: "Name the field." })}
      />
      <TextField
        label="Operator"
        error={errors.operator?.message}
        {...register("operator", { required: "Say who operates it." })}
      />
      <div className="grid grid-cols-2 gap-6">
        <TextField
          label="Working interest"
          unit="%"
          inputMode="decimal"
          error={errors.workingPercent?.message}
          {...register("workingPercent", { validate: isPercent })}
        />
        <TextField
          label="Net revenue interest"
          unit="%"
          inputMode="decimal"
          error={errors.netPercent?.message}
          {...register("netPercent", { validate: isPercent })}
        />
      </div>
      <p className="field-hint mt-3">
        It begins as contingent resources, development unclarified, with a chance of commerciality
        of 100 %. A planner can change that.
      </p>
      <div className="mt-4 grid gap-2">
        <Button type="submit" kind="primary" busy={isSubmitting}>
          Add the field and open it
        </Button>
        <LinkButton href="/people">Skip this, and add people first</LinkButton>
      </div>
    </form>
  );
}
