import { componentName } from "./component-names";

/** "C₇+ Heptanes plus": the symbol with its numbers set low, then the name where there is room. */
export function ComponentLabel({ symbol }: { symbol: string }) {
  const name = componentName(symbol);
  return (
    <span className="component-label">
      <b>
        <ComponentSymbol symbol={symbol} />
      </b>{" "}
      {name && <span className="soft">{name}</span>}
    </span>
  );
}

export function ComponentSymbol({ symbol }: { symbol: string }) {
  return symbol
    .split(/(\d+)/)
    .map((part, index) => (/^\d/.test(part) ? <sub key={index}>{part}</sub> : part));
}
