"use client";

import { useQuery } from "@tanstack/react-query";
import { sessionSchema, type SessionView } from "@/app/api/v1/session/schema";
import { request } from "./request";

/** Who is signed in and what their role allows: for hiding buttons; the server decides. */
export function useSession() {
  return useQuery({
    queryKey: ["session"],
    queryFn: ({ signal }) => request("/api/v1/session", { schema: sessionSchema, signal }),
    staleTime: 5 * 60_000,
  });
}

/** Whether the role of the person allows this; `false` until it is known. */
export function useCan(): (action: SessionView["can"][number]) => boolean {
  const { data } = useSession();
  return (action) => data?.can.includes(action) ?? false;
}
