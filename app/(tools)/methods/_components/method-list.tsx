import { Section } from "@/components/ui/section";
import type { EvidenceKind, Method, MethodGroup } from "./method";

/** How an error is known, before what it is. */
const evidenceWords: Record<EvidenceKind, string> = {
  exact: "none of its own",
  stated: "as published",
  measured: "as measured",
  unknown: "not known",
};

/** One group of methods: names at the left, what there is to know of each beside them. */
export function MethodList({ group }: { group: MethodGroup }) {
  return (
    <Section id={group.id} title={group.title} note={group.note}>
      <div className="divide-y divide-rule">
        {group.methods.map((method) => (
          <MethodEntry key={method.name} method={method} />
        ))}
      </div>
    </Section>
  );
}

function MethodEntry({ method }: { method: Method }) {
  const { name, gives, source, range, error, usedIn } = method;
  return (
    <article className="grid grid-cols-1 gap-x-8 gap-y-2 py-4 lg:grid-cols-[minmax(0,1fr)_minmax(0,2fr)]">
      <div>
        <h3>{name}</h3>
        <p className="text-ink-soft">{gives}</p>
      </div>
      <dl className="grid grid-cols-1 gap-x-8 gap-y-2 sm:grid-cols-2">
        <Fact term="Source">{source}</Fact>
        <Fact term="Valid">{range}</Fact>
        <Fact term={`Error: ${evidenceWords[error.kind]}`}>{error.text}</Fact>
        <Fact term="Used in">{usedIn}</Fact>
      </dl>
    </article>
  );
}

function Fact({ term, children }: { term: string; children: string }) {
  return (
    <div>
      <dt className="text-13 text-ink-soft">{term}</dt>
      <dd>{children}</dd>
    </div>
  );
}
