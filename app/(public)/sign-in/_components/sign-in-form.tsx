"use client";

import { useForm } from "react-hook-form";
import { signInHere, signInWords, type SignInFault } from "@/app/_client/sign-in";
import { Button } from "@/components/ui/button";
import { TextField } from "@/components/ui/field";
import { Notice } from "@/components/ui/status";
import { useState } from "react";

export interface DemoAccounts {
  people: readonly { name: string; email: string; role: string }[];
  password: string;
}

interface Credentials {
  email: string;
  password: string;
}

export interface SignInFormProps {
  /** where to go on to */
  next: string;
  /** the accounts of the demo, when the installation shows it */
  demo: DemoAccounts | null;
}

export function SignInForm({ next, demo }: SignInFormProps) {
  const [fault, setFault] = useState<SignInFault | null>(null);
  const { register, handleSubmit, setValue, setFocus, formState } = useForm<Credentials>({
    defaultValues: { email: "", password: "" },
  });
  const { errors, isSubmitting, isSubmitSuccessful } = formState;
  // Until the next page is there, the button stays busy: the session exists already.
  const busy = isSubmitting || (isSubmitSuccessful && fault === null);

  async function handleCredentials({ email, password }: Credentials) {
    setFault(null);
    const found = await signInHere(email, password);
    if (found === null) return window.location.assign(next);
    setFault(found);
    setFocus("password");
  }

  function handleChoose(email: string) {
    if (!demo) return;
    setFault(null);
    setValue("email", email);
    setValue("password", demo.password);
    void handleSubmit(handleCredentials)();
  }

  return (
    <>
      {/* Without script nothing may land in the address, hence the method. */}
      <form method="post" noValidate onSubmit={handleSubmit(handleCredentials)}>
        {fault && <Notice tone="error" {...signInWords[fault]} />}
        <TextField
          label="Work e-mail"
          type="email"
          autoComplete="username"
          autoFocus
          error={errors.email?.message}
          {...register("email", { required: "Give your e-mail address." })}
        />
        <TextField
          label="Password"
          type="password"
          autoComplete="current-password"
          error={errors.password?.message}
          {...register("password", { required: "Give your password." })}
        />
        <Button type="submit" kind="primary" className="mt-4" busy={busy} busyLabel="Signing in…">
          Sign in
        </Button>
      </form>
      {demo && (
        <section aria-labelledby="demo-accounts">
          <h2 id="demo-accounts" className="text-14">
            This installation shows the demo. Look at it as
          </h2>
          <ul className="demo-accounts">
            {demo.people.map(({ name, email, role }) => (
              <li key={email}>
                <button type="button" disabled={busy} onClick={() => handleChoose(email)}>
                  <b>{role.charAt(0).toUpperCase() + role.slice(1)}</b> {name}
                </button>
              </li>
            ))}
          </ul>
          <p className="field-hint">
            All five share the password <code>{demo.password}</code>.
          </p>
        </section>
      )}
    </>
  );
}
