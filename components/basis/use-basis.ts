"use client";

import { usePathname, useRouter, useSearchParams } from "next/navigation";
import { useCallback, useMemo } from "react";
import { basisHref, parseBasis, type Basis } from "./basis";

/** The basis of this page and the way to change a part of it, which replaces the address. */
export function useBasis(): {
  basis: Basis;
  setBasis: (change: Partial<Basis>) => void;
  /** a link that carries the basis on */
  withBasis: (href: string) => string;
} {
  const router = useRouter();
  const pathname = usePathname();
  const search = useSearchParams();
  const basis = useMemo(() => parseBasis(search), [search]);

  const setBasis = useCallback(
    (change: Partial<Basis>) => {
      const query = search.toString();
      const here = query ? `${pathname}?${query}` : pathname;
      router.replace(basisHref(here, { ...basis, ...change }), { scroll: false });
    },
    [basis, pathname, router, search],
  );
  const withBasis = useCallback((href: string) => basisHref(href, basis), [basis]);

  return { basis, setBasis, withBasis };
}
