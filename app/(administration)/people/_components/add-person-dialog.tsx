"use client";

import { useId, useState } from "react";
import { Controller, useForm } from "react-hook-form";
import { placeProblems } from "@/app/_client/form-problems";
import type { NewUserRequest, UserView } from "@/app/api/v1/users/schema";
import { Button } from "@/components/ui/button";
import { Select } from "@/components/ui/choice";
import { Dialog } from "@/components/ui/dialog";
import { TextField } from "@/components/ui/field";
import { SecretOnce } from "@/components/ui/secret-once";
import { Notice } from "@/components/ui/status";
import { useAddUser } from "../_queries/users";
import { makePassword } from "./new-password";
import { PasswordField } from "./password-field";
import { roleName, roleOptions } from "./role-words";

interface Added {
  person: UserView;
  password: string;
}

/** A new account; its first password is shown once, to be told to the person. */
export function AddPersonDialog({ onClose }: { onClose: () => void }) {
  const formId = useId();
  const add = useAddUser();
  const [problem, setProblem] = useState<string | null>(null);
  const [added, setAdded] = useState<Added | null>(null);
  const { control, register, handleSubmit, setError, setValue, formState } =
    useForm<NewUserRequest>({
      defaultValues: { name: "", email: "", role: "engineer", password: makePassword() },
    });
  const { errors } = formState;

  async function handlePerson(person: NewUserRequest) {
    setProblem(null);
    try {
      setAdded({ person: await add.mutateAsync(person), password: person.password });
    } catch (error) {
      setProblem(placeProblems(error, setError, ["name", "email", "role", "password"]));
    }
  }

  if (added) {
    return (
      <Dialog
        open
        onClose={onClose}
        title={`${added.person.name} can sign in`}
        description={`As ${roleName(added.person.role).toLowerCase()}, with ${added.person.email} and this password. Tell it to them; they can change it under Profile.`}
        actions={
          <Button kind="primary" onClick={onClose}>
            Done
          </Button>
        }
      >
        <div className="mt-3">
          <SecretOnce secret={added.password} />
        </div>
      </Dialog>
    );
  }
  return (
    <Dialog
      open
      onClose={onClose}
      title="Add a person"
      actions={
        <>
          <Button onClick={onClose}>Cancel</Button>
          <Button kind="primary" type="submit" form={formId} busy={add.isPending}>
            Add them
          </Button>
        </>
      }
    >
      <form id={formId} noValidate className="form-grid" onSubmit={handleSubmit(handlePerson)}>
        {problem && <Notice tone="error" title={problem} />}
        <TextField
          label="Name"
          autoComplete="off"
          error={errors.name?.message}
          {...register("name", { required: "Give the name, as others should see it." })}
        />
        <TextField
          label="Work e-mail"
          type="email"
          autoComplete="off"
          error={errors.email?.message}
          {...register("email", { required: "Give the address that they will sign in with." })}
        />
        <Controller
          control={control}
          name="role"
          render={({ field }) => (
            <Select
              label="Role"
              value={field.value}
              options={roleOptions}
              error={errors.role?.message}
              onChange={field.onChange}
            />
          )}
        />
        <Controller
          control={control}
          name="password"
          rules={{ required: "Give a first password." }}
          render={({ field }) => (
            <PasswordField
              value={field.value}
              error={errors.password?.message}
              onChange={field.onChange}
              onMake={() => setValue("password", makePassword(), { shouldValidate: true })}
            />
          )}
        />
      </form>
    </Dialog>
  );
}
