"use client";

import { useState } from "react";
import { useForm } from "react-hook-form";
import { placeProblems } from "@/app/_client/form-problems";
import { request } from "@/app/_client/request";
import { signInHere, signInWords } from "@/app/_client/sign-in";
import { setupSchema, type SetupRequest } from "@/app/api/v1/setup/schema";
import { Button, LinkButton } from "@/components/ui/button";
import { TextField } from "@/components/ui/field";
import { Notice } from "@/components/ui/status";

/** The first person, who invites the others. Signs them in, so that the next steps are theirs. */
export function AdministratorStep({ onDone }: { onDone: () => void }) {
  const [problem, setProblem] = useState<string | null>(null);
  const { register, handleSubmit, setError, formState } = useForm<SetupRequest>();
  const { errors, isSubmitting } = formState;

  async function handlePerson(person: SetupRequest) {
    setProblem(null);
    try {
      await request("/api/v1/setup", { method: "POST", body: person, schema: setupSchema });
    } catch (error) {
      setProblem(placeProblems(error, setError, ["name", "email", "password"]));
      return;
    }
    const fault = await signInHere(person.email, person.password);
    if (fault) setProblem(`Your account is made. ${signInWords[fault].title}`);
    else onDone();
  }

  return (
    <form method="post" noValidate onSubmit={handleSubmit(handlePerson)}>
      <p className="text-ink-soft">
        Nobody has an account here yet. The first one is an administrator: they add the others and
        say who may do what.
      </p>
      {problem && (
        <Notice
          tone="error"
          title={problem}
          actions={
            <LinkButton size="small" href="/sign-in">
              Sign in
            </LinkButton>
          }
        />
      )}
      <TextField
        label="Your name"
        autoComplete="name"
        autoFocus
        error={errors.name?.message}
        {...register("name", { required: "Give your name, as others should see it." })}
      />
      <TextField
        label="Work e-mail"
        type="email"
        autoComplete="username"
        error={errors.email?.message}
        {...register("email", { required: "Give the address that you will sign in with." })}
      />
      <TextField
        label="Password"
        type="password"
        autoComplete="new-password"
        hint="12 characters or more. A few words in a row are easy to remember."
        error={errors.password?.message}
        {...register("password", { required: "Choose a password." })}
      />
      <Button type="submit" kind="primary" className="mt-4" busy={isSubmitting}>
        Make my account
      </Button>
    </form>
  );
}
