import type { ApiToken } from "@/models/api-token";
import { presentMoment } from "../common-presenter";
import type { ApiTokenView } from "./schema";

export function presentApiToken(token: ApiToken): ApiTokenView {
  return {
    id: token.id,
    name: token.name,
    createdAt: presentMoment(token.createdAt),
    lastUsedAt: presentMoment(token.lastUsedAt),
    revokedAt: presentMoment(token.revokedAt),
  };
}
