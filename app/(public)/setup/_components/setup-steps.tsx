"use client";

import { useState } from "react";
import { AdministratorStep } from "./administrator-step";
import { FieldStep } from "./field-step";
import { OrganisationStep } from "./organisation-step";

const steps = ["administrator", "organisation", "field"] as const;
type Step = (typeof steps)[number];

const names: Record<Step, string> = {
  administrator: "You",
  organisation: "Your organisation",
  field: "The first field",
};

export interface SetupStepsProps {
  startAt: Step;
  /** its name so far */
  organisation: string;
}

/** Three short steps from an empty installation to a first field. Each is saved before the next begins. */
export function SetupSteps({ startAt, organisation }: SetupStepsProps) {
  const [step, setStep] = useState<Step>(startAt);
  const [operator, setOperator] = useState(organisation);
  const current = steps.indexOf(step);
  return (
    <>
      <ol className="setup-steps" aria-label="Steps">
        {steps.map((name, index) => (
          <li key={name} aria-current={name === step ? "step" : undefined}>
            <span>{index + 1}</span> {names[name]}
            {index < current && <span className="sr-only">, done</span>}
          </li>
        ))}
      </ol>
      {step === "administrator" && <AdministratorStep onDone={() => setStep("organisation")} />}
      {step === "organisation" && (
        <OrganisationStep
          name={operator}
          onDone={(name) => {
            setOperator(name);
            setStep("field");
          }}
        />
      )}
      {step === "field" && <FieldStep operator={operator} />}
    </>
  );
}
