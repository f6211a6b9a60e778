import { Disclosure } from "@/components/ui/dialog";
import { Section } from "@/components/ui/section";
import type { Calculation } from "./calculation";
import { CodeBlock } from "./code-block";
import { describeSchema } from "./describe-schema";

import { ShapeTable } from "./shape-table";

/** A single-quoted word of a POSIX shell. */
const quoted = (text: string): string => `'${text.replaceAll("'", String.raw`'\''`)}'`;

/** One calculation: what goes in, what comes out, and an example that works as it stands. */
export function CalculationGuide({
  calculation,
  answer,
  origin,
}: {
  calculation: Calculation;
  answer: unknown;
  origin: string;
}) {
  const { name, title, purpose, request, response, example } = calculation;
  const path = `/api/v1/calculations/${name}`;
  const curl = [
    `curl -s -X POST ${origin}${path} \\`,
    `  -H "authorization: Bearer $DEWLEDGER_TOKEN" \\`,
    `  -H "content-type: application/json" \\`,
    `  -d ${quoted(JSON.stringify(example, null, 2))}`,
  ].join("\n");
  return (
    <Section title={title} note={`POST ${path}. ${purpose}`} id={name}>
      <div className="grid grid-cols-1 gap-4">
        <div className="columns columns-equal">
          <CodeBlock label={`Ask for ${title.toLowerCase()}`}>{curl}</CodeBlock>
          <CodeBlock label="Answer, long lists cut short">
            {JSON.stringify(answer, null, 2)}
          </CodeBlock>
        </div>
        <Disclosure label={`Fields of the request to ${name}`}>
          <div className="mt-2">
            <ShapeTable
              caption={`Request to ${path}`}
              rows={describeSchema(request, "input")}
              isRequest
            />
          </div>
        </Disclosure>
        <Disclosure label={`Fields of the answer of ${name}`}>
          <div className="mt-2">
            <ShapeTable
              caption={`Answer of ${path}`}
              rows={describeSchema(response, "output")}
              isRequest={false}
            />
          </div>
        </Disclosure>
      </div>
    </Section>
  );
}
