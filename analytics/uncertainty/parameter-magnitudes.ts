import { DomainError } from "../errors";
import type { SimpleDistribution } from "./distribution-schema";
import { requireFinite } from "./parameter-checks";

/** Beyond it no quantity of a reservoir lies, in any unit; products and squares of what lies below stay finite. */
const LARGEST = 1e20;

/**
 * Refuses parameters beyond anything that a reservoir has.
 *
 * @returns  path of the largest parameter, such as `mean` or `points.1.value`; of data, `values`
 * @throws {DomainError} naming the parameter
 */
export function requireMagnitudes(definition: SimpleDistribution): string {
  const parameters = parametersOf(definition);
  for (const [input, value] of parameters) {
    if (Math.abs(requireFinite(input, value)) <= LARGEST) continue;
    throw new DomainError(
      `${Number(value.toPrecision(6))} is beyond what any quantity of a reservoir can be, in any unit (1e20).`,
      { input, value },
    );
  }
  if (definition.kind === "data") return "values";
  return parameters.reduce((a, b) => (Math.abs(b[1]) > Math.abs(a[1]) ? b : a))[0];
}

/** In the quantity's own unit, but for a sigma, which has none. */
function parametersOf(d: SimpleDistribution): (readonly [input: string, value: number])[] {
  switch (d.kind) {
    case "constant":
      return [["value", d.value]];
    case "uniform":
    case "triangular":
    case "pert":
      return [
        ["low", d.low],
        ["high", d.high],
        ...("mode" in d ? [["mode", d.mode] as const] : []),
      ];
    case "normal":
      return [
        ["mean", d.mean],
        ["standardDeviation", d.standardDeviation],
      ];
    case "lognormal":
      // The sign of mu says on which side of 1 the values lie; both sides have an end.
      return [["mu", Math.exp(Math.abs(requireFinite("mu", d.mu)))]];
    case "normalP90P10":
    case "lognormalP90P10":
      return [
        ["p90", d.p90],
        ["p10", d.p10],
      ];
    case "percentiles":
      return d.points.map(({ value }, i) => [`points.${i}.value`, value] as const);
    case "data":
      return d.values.map((value, i) => [`values.${i}`, value] as const);
  }
}
