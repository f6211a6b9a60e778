"use client";

import { useState } from "react";
import { useForm } from "react-hook-form";
import { z } from "zod";
import { placeProblems } from "@/app/_client/form-problems";
import { request } from "@/app/_client/request";
import { signInHere } from "@/app/_client/sign-in";
import { Button } from "@/components/ui/button";
import { TextField } from "@/components/ui/field";
import { Notice } from "@/components/ui/status";

interface PasswordChange {
  currentPassword: string;
  password: string;
  again: string;
}

/** Every session ends with the old password; this device signs in anew at once, so the person stays where they are. */
export function PasswordForm({ email }: { email: string }) {
  const [problem, setProblem] = useState<string | null>(null);
  const [isDone, setIsDone] = useState(false);
  const { register, handleSubmit, setError, reset, getValues, formState } = useForm<PasswordChange>(
    { defaultValues: { currentPassword: "", password: "", again: "" } },
  );
  const { errors, isSubmitting } = formState;

  async function handleChange({ currentPassword, password }: PasswordChange) {
    setProblem(null);
    setIsDone(false);
    try {
      await request("/api/v1/session/password", {
        method: "POST",
        body: { currentPassword, password },
        schema: z.undefined(),
      });
    } catch (error) {
      setProblem(placeProblems(error, setError, ["currentPassword", "password"]));
      return;
    }
    reset();
    const fault = await signInHere(email, password);
    if (fault) window.location.reload();
    else setIsDone(true);
  }

  return (
    <form
      method="post"
      noValidate
      className="form-grid max-w-[360px]"
      onSubmit={handleSubmit(handleChange)}
    >
      {problem && <Notice tone="error" title={problem} />}
      {isDone && (
        <Notice tone="success" title="Your password is changed.">
          Other devices are signed out and API tokens are revoked.
        </Notice>
      )}
      {/* Password managers look for whose password this is. */}
      <input type="hidden" name="username" autoComplete="username" value={email} readOnly />
      <TextField
        label="Present password"
        type="password"
        autoComplete="current-password"
        error={errors.currentPassword?.message}
        {...register("currentPassword", { required: "Give your present password." })}
      />
      <TextField
        label="New password"
        type="password"
        autoComplete="new-password"
        hint="12 characters or more. A few words in a row are easy to remember."
        error={errors.password?.message}
        {...register("password", {
          required: "Choose a new password.",
          minLength: { value: 12, message: "Must have at least 12 characters." },
        })}
      />
      <TextField
        label="New password again"
        type="password"
        autoComplete="new-password"
        error={errors.again?.message}
        {...register("again", {
          validate: (again) =>
            again === getValues("password") || "This is not the same as the one above.",
        })}
      />
      <div>
        <Button type="submit" kind="primary" busy={isSubmitting} busyLabel="Changing…">
          Change password
        </Button>
      </div>
    </form>
  );
}
