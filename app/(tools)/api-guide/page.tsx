import type { Metadata } from "next";
import { requireActor } from "@/app/_server/session";
import { Page, PageHead, Stack } from "@/components/ui/section";
import { env } from "@/services/env";
import { can } from "@/services/policy";
import { CalculationGuide } from "./_components/calculation-guide";
import { calculations } from "./_components/examples";
import { FileAddresses } from "./_components/file-addresses";
import { fluidCalculations } from "./_components/fluid-examples";
import { SharedShapes } from "./_components/shared-shapes";
import { TokenSection } from "./_components/token-section";
import { exampleAnswers } from "./_server/answers";

export const metadata: Metadata = { title: "API and tokens" };

export default async function ApiGuidePage() {
  const actor = await requireActor("calculation.run");
  const answers = await exampleAnswers();
  const origin = new URL(env().NEXTAUTH_URL).origin;
  return (
    <Page>
      <PageHead
        title="Let a script ask the book"
        lead="Every page reads from the same HTTP API. Make a token, send it as a bearer token, and a script may do what you may. Gas is in scf at 14.696 psia and 60 °F, condensate in stock-tank barrels, fractions from 0 to 1."
      />
      <Stack>
        <TokenSection />
        <FileAddresses
          origin={origin}
          mayImport={can(actor, "import.create")}
          mayRun={can(actor, "run.create")}
        />
        {[...calculations, ...fluidCalculations].map((calculation) => (
          <CalculationGuide
            key={calculation.name}
            calculation={calculation}
            answer={answers[calculation.name]}
            origin={origin}
          />
        ))}
        <SharedShapes />
      </Stack>
    </Page>
  );
}
