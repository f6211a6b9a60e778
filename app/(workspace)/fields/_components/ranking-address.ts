"use client";

import { usePathname, useSearchParams } from "next/navigation";
import { useCallback, useMemo } from "react";
import type { z } from "zod";
import {
  rankingExportQuerySchema,
  rankingFilterSchema,
  rankingOrderSchema,
} from "@/app/api/v1/fields/ranking-schema";
import { defaultRankingColumns } from "@/analytics/portfolio/ranking-columns";
import { basisParams } from "@/components/basis/basis";
import { useBasis } from "@/components/basis/use-basis";

/** Rows shown at a time. */
export const PAGE_ROWS = 100;

const viewShape = {
  ...rankingFilterSchema.shape,
  ...rankingOrderSchema.shape,
  columns: rankingExportQuerySchema.shape.columns,
};

/** What is looked at and how: everything of the ranking's address that is not the basis. */
export type RankingView = z.output<typeof rankingFilterSchema> &
  z.output<typeof rankingOrderSchema> & {
    columns: z.output<typeof rankingExportQuerySchema>["columns"];
    offset: number;
  };

type Part = keyof typeof viewShape;
const parts = Object.keys(viewShape) as Part[];

/** A part that is missing or not understood is its default, so that an old link still opens. */
function viewOf(search: URLSearchParams): RankingView {
  const entries = parts.map((part) => {
    const read = viewShape[part].safeParse(search.get(part) ?? undefined);
    return [part, read.success ? read.data : viewShape[part].parse(undefined)];
  });
  const offset = Number(search.get("offset"));
  return {
    ...(Object.fromEntries(entries) as Omit<RankingView, "offset">),
    offset: Number.isInteger(offset) && offset > 0 ? offset : 0,
  };
}

const isDefault = (part: Part, text: string) =>
  text === "" ||
  (part === "sort" && text === "liquidValueMean") ||
  (part === "direction" && text === "descending") ||
  (part === "columns" && text === defaultRankingColumns.join(","));

/** The parts that are not the default, ready for an address. */
function paramsOf(view: RankingView): URLSearchParams {
  const params = new URLSearchParams();
  for (const part of parts) {
    const value = view[part];
    const text = Array.isArray(value) ? value.join(",") : String(value ?? "");
    if (!isDefault(part, text)) params.set(part, text);
  }
  if (view.offset > 0) params.set("offset", String(view.offset));
  return params;
}

/** The ranking's view and the way to change it: it lives in the address, so a link shows the same rows. */
export function useRankingView() {
  const pathname = usePathname();
  const search = useSearchParams();
  const { basis } = useBasis();
  const view = useMemo(() => viewOf(new URLSearchParams(search)), [search]);

  const searchOf = useCallback(
    (of: RankingView) => {
      const params = basisParams(basis);
      paramsOf(of).forEach((value, name) => params.set(name, value));
      return params;
    },
    [basis],
  );
  /**
   * A change of what is shown begins at the first row again. The address changes in the browser alone: the page itself
   * is the same, and nobody should wait for a server to render it again.
   */
  const setView = useCallback(
    (change: Partial<RankingView>) => {
      const text = searchOf({ ...view, offset: 0, ...change }).toString();
      window.history.replaceState(null, "", text ? `${pathname}?${text}` : pathname);
    },
    [pathname, searchOf, view],
  );
  const apiSearch = searchOf(view);
  apiSearch.delete("columns");
  apiSearch.set("limit", String(PAGE_ROWS));
  const exportSearch = searchOf({ ...view, offset: 0 });

  return {
    basis,
    view,
    setView,
    /** query of GET /api/v1/fields */
    apiSearch: apiSearch.toString(),
    /** query of GET /api/v1/exports/ranking.csv */
    exportSearch: exportSearch.toString(),
  };
}

export type RankingState = ReturnType<typeof useRankingView>;

/** Is anything filtered out? */
export const isFiltered = (view: RankingView) =>
  view.search !== "" ||
  [view.basin, view.class, view.state, view.engineer].some((list) => list.length > 0) ||
  view.yieldFrom !== undefined ||
  view.yieldTo !== undefined;

export const noFilter: Partial<RankingView> = {
  search: "",
  basin: [],
  class: [],
  state: [],
  engineer: [],
  yieldFrom: undefined,
  yieldTo: undefined,
};
