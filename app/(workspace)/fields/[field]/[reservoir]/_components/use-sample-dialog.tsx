"use client";

import { useState } from "react";
import { useRouter } from "next/navigation";
import type { SeparatorTest } from "@/analytics/fluid/separator-test-schema";
import { textOfDistribution } from "@/components/estimate/input-text";
import { readQuantity } from "@/components/estimate/quantities-of-inputs";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { Checkbox, NumberField } from "@/components/ui/field";
import { formatFigure } from "@/components/ui/format";
import { useReservoir } from "../_editor/reservoir-context";

const tidy = (value: number) => Number(value.toPrecision(3));

/** Puts the sheet into the draft, and with it, if wanted, a yield range around what it gives. */
export function UseSampleDialog({
  open,
  onClose,
  test,
  sampleId,
  origin,
  yieldStbPerMmscf,
}: {
  open: boolean;
  onClose: () => void;
  test: SeparatorTest;
  sampleId: string | null;
  /** what the test is: "separator test" for a measured one */
  origin: string;
  yieldStbPerMmscf: number;
}) {
  const { draft, place, page, withBasis } = useReservoir();
  const router = useRouter();
  const [withYield, setWithYield] = useState(true);
  const [spread, setSpread] = useState("10");
  const read = readQuantity(spread, "fraction", "%", "%");
  const isPossible = read.value !== null && read.value > 0 && read.value < 1;
  const range = isPossible
    ? {
        p90: tidy(yieldStbPerMmscf * (1 - (read.value ?? 0))),
        p10: tidy(yieldStbPerMmscf * (1 + (read.value ?? 0))),
      }
    : null;
  const sampleName = page.fluidSamples.find(({ id }) => id === sampleId)?.name;

  function handleUse() {
    const source = `${sampleName ? `Sample ${sampleName}, ${origin}` : origin[0].toUpperCase() + origin.slice(1)} ± ${spread.replace("%", "").trim()} %`;
    draft?.setFluid(
      test,
      sampleId,
      withYield && range
        ? textOfDistribution({ kind: "normalP90P10", ...range }, source)
        : undefined,
    );
    onClose();
    router.push(withBasis(`/fields/${place.field}/${place.reservoir}`));
  }

  return (
    <Dialog
      open={open}
      onClose={onClose}
      title="Use this separator test in the draft"
      description={
        sampleId === null
          ? "The sheet is copied in as it stands. It belongs to no saved sample."
          : `The sheet of ${sampleName} is copied in; a later change of the sample leaves the draft alone.`
      }
      actions={
        <>
          <Button onClick={onClose}>Cancel</Button>
          <Button kind="primary" disabled={withYield && !range} onClick={handleUse}>
            Use it
          </Button>
        </>
      }
    >
      <div className="grid gap-3">
        <Checkbox
          label={`Set the condensate yield around the ${formatFigure(yieldStbPerMmscf)} STB/MMscf it gives`}
          checked={withYield}
          onChange={(event) => setWithYield(event.target.checked)}
        />
        {withYield && (
          <div className="w-40">
            <NumberField
              label="P90 and P10 at"
              unit="± %"
              hint={
                range
                  ? `P90 ${formatFigure(range.p90)}, P10 ${formatFigure(range.p10)} STB/MMscf`
                  : undefined
              }
              error={isPossible ? undefined : (read.problem ?? "More than 0 and less than 100 %.")}
              value={spread}
              onChange={(event) => setSpread(event.target.value)}
            />
          </div>
        )}
        <p className="text-13 text-ink-soft">
          How far a single sample stands for the reservoir is a judgement; ± 10 % is a start, not a
          finding.
        </p>
      </div>
    </Dialog>
  );
}
