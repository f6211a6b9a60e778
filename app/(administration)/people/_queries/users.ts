"use client";

import { useMutation, useQuery, useQueryClient } from "@tanstack/react-query";
import { request } from "@/app/_client/request";
import { pageOf } from "@/app/api/v1/common-schema";
import { userSchema, type NewUserRequest, type UserPatchRequest } from "@/app/api/v1/users/schema";

const key = ["users"] as const;
const listSchema = pageOf(userSchema);
const PAGE = 200;

/** Everybody with an account, by name. */
export function useUsers(offset: number) {
  return useQuery({
    queryKey: [...key, offset],
    queryFn: ({ signal }) =>
      request(`/api/v1/users?limit=${PAGE}&offset=${offset}`, { schema: listSchema, signal }),
  });
}

export function useAddUser() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: NewUserRequest) =>
      request("/api/v1/users", { method: "POST", body, schema: userSchema }),
    onSuccess: () => client.invalidateQueries({ queryKey: key }),
  });
}

/** Changes one account. After a failure the list is read anew as well: somebody else may have changed it. */
export function useChangeUser() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({
      id,
      version,
      patch,
    }: {
      id: string;
      version: number;
      patch: UserPatchRequest;
    }) =>
      request(`/api/v1/users/${id}`, { method: "PATCH", version, body: patch, schema: userSchema }),
    onSettled: () => client.invalidateQueries({ queryKey: key }),
  });
}
