import { z } from "zod";

/**
 * On what every number of a page stands. It lives in the address, so a link shows the same numbers
 * to the next person; what is left out of the address is the approved default.
 */
export const basisSchema = z.object({
  /** id of a published price deck, or the latest one */
  deck: z.union([z.uuid(), z.literal("latest")]).default("latest"),
  case: z.enum(["low", "mid", "high"]).default("mid"),
  estimates: z.enum(["approved", "latest"]).default("approved"),
  interest: z.enum(["gross", "net"]).default("net"),
  /** `risked`: every trial times the chance; `yesNo`: a field is there or not, drawn trial by trial */
  risk: z.enum(["unrisked", "risked", "yesNo"]).default("unrisked"),
  /** id of a dependence set, or the book's own */
  dependence: z.union([z.uuid(), z.literal("default")]).default("default"),
  units: z.enum(["field", "metric"]).default("field"),
  /** pressure base of gas volumes [psia at 60 degF], or `metric`: 101.325 kPa and 15 degC */
  base: z.enum(["14.696", "14.65", "14.73", "15.025", "metric"]).default("14.696"),
});

export type Basis = z.infer<typeof basisSchema>;
export type BasisPart = keyof Basis;

export const defaultBasis: Basis = basisSchema.parse({});
export const basisParts = Object.keys(basisSchema.shape) as BasisPart[];

type SearchRecord = Record<string, string | string[] | undefined>;

const first = (value: string | string[] | null | undefined) =>
  Array.isArray(value) ? value[0] : (value ?? undefined);

/**
 * Reads the basis from an address (`URLSearchParams`, or a page's `searchParams`). A part that is
 * missing or not understood is the default, so an old or mistyped link still opens.
 */
export function parseBasis(search: Pick<URLSearchParams, "get"> | SearchRecord): Basis {
  const read = (part: string) =>
    typeof search.get === "function"
      ? first(search.get(part))
      : first((search as SearchRecord)[part]);
  const entries = basisParts.map((part) => {
    const parsed = basisSchema.shape[part].safeParse(read(part));
    return [part, parsed.success ? parsed.data : defaultBasis[part]];
  });
  return basisSchema.parse(Object.fromEntries(entries));
}

/** Parts that are not the default, ready for an address. */
export function basisParams(basis: Basis): URLSearchParams {
  const params = new URLSearchParams();
  for (const part of basisParts) {
    if (basis[part] !== defaultBasis[part]) params.set(part, basis[part]);
  }
  return params;
}

/** `href` with the basis in its query; its other parameters and its fragment are kept. */
export function basisHref(href: string, basis: Basis): string {
  const [address, fragment] = href.split("#");
  const [path, query] = address.split("?");
  const params = new URLSearchParams(query);
  for (const part of basisParts) params.delete(part);
  basisParams(basis).forEach((value, part) => params.set(part, value));
  const search = params.toString();
  return `${path}${search ? `?${search}` : ""}${fragment === undefined ? "" : `#${fragment}`}`;
}
