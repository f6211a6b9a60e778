/** What an entry of the catalogue of methods says. */

/** What stands behind an error: a balance, the authors' word, a comparison of ours with data, or nothing yet. */
export const evidenceKinds = ["exact", "stated", "measured", "unknown"] as const;
export type EvidenceKind = (typeof evidenceKinds)[number];

export interface Method {
  readonly name: string;
  /** what it gives, in a sentence */
  readonly gives: string;
  readonly source: string;
  /** where it may be used, and what happens outside */
  readonly range: string;
  readonly error: { readonly kind: EvidenceKind; readonly text: string };
  readonly usedIn: string;
}

export interface MethodGroup {
  readonly id: string;
  readonly title: string;
  readonly note: string;
  readonly methods: readonly Method[];
}

export const exact = (text: string) => ({ kind: "exact", text }) as const;
export const stated = (text: string) => ({ kind: "stated", text }) as const;
export const measured = (text: string) => ({ kind: "measured", text }) as const;
export const unknown = (text: string) => ({ kind: "unknown", text }) as const;
