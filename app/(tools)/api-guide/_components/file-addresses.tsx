import { Section } from "@/components/ui/section";
import { CodeBlock } from "./code-block";

/** Files a script can fetch or send, and long work it can begin: the same as on the screens. */
export function FileAddresses({
  origin,
  mayImport,
  mayRun,
}: {
  origin: string;
  mayImport: boolean;
  mayRun: boolean;
}) {
  const bearer = `-H "authorization: Bearer $DEWLEDGER_TOKEN"`;
  return (
    <Section
      title="Fetch the budget, bring in a sheet, run the book again"
      note="What a token may do is what its owner may do, as their role stands at that moment."
    >
      <div className="columns columns-equal">
        <CodeBlock label="Fetch the budget layout of the ranking">
          {`curl -s ${origin}/api/v1/exports/budget.csv \\\n  ${bearer} \\\n  -o budget.csv`}
        </CodeBlock>
        {mayImport && (
          <CodeBlock label="Check a sheet of reservoirs, then take its good rows">
            {[
              `curl -s ${origin}/api/v1/imports \\`,
              `  ${bearer} \\`,
              `  -F "file=@reservoirs.csv;type=text/csv"`,
              ``,
              `curl -s -X POST ${origin}/api/v1/imports/ID/commit \\`,
              `  ${bearer} \\`,
              `  -H "content-type: application/json" \\`,
              `  -d '{"rows": "good"}'`,
            ].join("\n")}
          </CodeBlock>
        )}
        {mayRun && (
          <CodeBlock label="Compute every approved estimate again, follow it, list what moved">
            {[
              `curl -s ${origin}/api/v1/runs \\`,
              `  ${bearer} \\`,
              `  -H "content-type: application/json" \\`,
              `  -H "idempotency-key: $(uuidgen)" \\`,
              `  -d '{"kind": "recalculation", "scope": "approved"}'`,
              ``,
              `curl -s ${origin}/api/v1/runs/ID \\`,
              `  ${bearer}`,
              ``,
              `curl -s "${origin}/api/v1/runs/ID/items?movedBeyond=2" \\`,
              `  ${bearer}`,
            ].join("\n")}
          </CodeBlock>
        )}
      </div>
    </Section>
  );
}
