import type { Basin } from "@/models/basin";
import type { BasinView } from "./schema";

export function presentBasin({ id, slug, name, version }: Basin): BasinView {
  return { id, slug, name, version };
}
