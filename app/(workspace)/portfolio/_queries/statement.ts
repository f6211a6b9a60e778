"use client";

import { keepPreviousData, useQuery } from "@tanstack/react-query";
import { request } from "@/app/_client/request";
import { statementSchema } from "@/app/api/v1/portfolio/schema";
import { basisParams, type Basis } from "@/components/basis/basis";

/** The statement of the portfolio on a basis; the last one stays while the next is computed. */
export function useStatement(basis: Basis) {
  const search = basisParams(basis).toString();
  return useQuery({
    queryKey: ["portfolio", search],
    queryFn: ({ signal }) =>
      request(`/api/v1/portfolio${search && `?${search}`}`, { schema: statementSchema, signal }),
    placeholderData: keepPreviousData,
  });
}
