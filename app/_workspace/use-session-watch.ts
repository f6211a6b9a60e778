"use client";

import { useQueryClient } from "@tanstack/react-query";
import { useRouter } from "next/navigation";
import { useEffect } from "react";
import { ProblemError } from "@/app/_client/request";

const isSignedOut = (error: unknown) => error instanceof ProblemError && error.status === 401;

/**
 * Leads to the sign-in page, and back afterwards, when any answer says that this session is over: it ran out, it was
 * ended from another device, or the account was made inactive.
 */
export function useSessionWatch(): void {
  const client = useQueryClient();
  const router = useRouter();
  useEffect(() => {
    function leave() {
      const here = window.location.pathname + window.location.search;
      router.push(`/sign-in?callbackUrl=${encodeURIComponent(here)}`);
    }
    const stops = [
      client.getQueryCache().subscribe((event) => {
        if (event.type === "updated" && isSignedOut(event.query.state.error)) leave();
      }),
      client.getMutationCache().subscribe((event) => {
        if (event.type === "updated" && isSignedOut(event.mutation.state.error)) leave();
      }),
    ];
    return () => stops.forEach((stop) => stop());
  }, [client, router]);
}
