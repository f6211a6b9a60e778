"use client";

import { useState } from "react";
import { errorWords, ProblemError } from "@/app/_client/request";
import type { UserPatchRequest, UserView } from "@/app/api/v1/users/schema";
import { Button } from "@/components/ui/button";
import { Select } from "@/components/ui/choice";
import { Dialog } from "@/components/ui/dialog";
import { TextField } from "@/components/ui/field";
import { SecretOnce } from "@/components/ui/secret-once";
import { Notice } from "@/components/ui/status";
import { useToast } from "@/components/ui/toast";
import { useChangeUser } from "../_queries/users";
import { makePassword } from "./new-password";
import { PasswordField } from "./password-field";
import { roleName, roleOptions } from "./role-words";

export type PersonQuestion = "role" | "password" | "signOut" | "deactivate" | "activate";

const words: Record<PersonQuestion, { title: string; text: string; action: string }> = {
  role: {
    title: "Name and role of",
    text: "A new role counts from their next click.",
    action: "Save",
  },
  password: {
    title: "New password for",
    text: "The old one stops working, they are signed out on every device, and their API tokens are revoked.",
    action: "Set it",
  },
  signOut: {
    title: "Sign out everywhere:",
    text: "Every session of theirs ends with their next click, and their API tokens are revoked. They can sign in again.",
    action: "Sign them out",
  },
  deactivate: {
    title: "Make inactive:",
    text: "They are signed out with their next click, cannot sign in, and their API tokens are revoked. Their work and their name in the history stay.",
    action: "Make inactive",
  },
  activate: {
    title: "Make active again:",
    text: "They can sign in again, in the role they had.",
    action: "Make active",
  },
};

export interface PersonDialogProps {
  person: UserView;
  question: PersonQuestion;
  isOwn: boolean;
  onClose: () => void;
}

/** One change to one account, said in words before it is made. */
export function PersonDialog({ person, question, isOwn, onClose }: PersonDialogProps) {
  const toast = useToast();
  const change = useChangeUser();
  const [name, setName] = useState(person.name);
  const [role, setRole] = useState(person.role);
  const [password, setPassword] = useState(makePassword);
  const [problem, setProblem] = useState<string | null>(null);
  const [isSet, setIsSet] = useState(false);
  const { title, text, action } = words[question];

  const patches: Record<PersonQuestion, UserPatchRequest> = {
    role: { name, role },
    password: { password },
    signOut: { signOutEverywhere: true },
    deactivate: { active: false },
    activate: { active: true },
  };

  async function handleChange() {
    setProblem(null);
    try {
      const { id, version } = person;
      const saved = await change.mutateAsync({ id, version, patch: patches[question] });
      if (question === "password") return setIsSet(true);
      toast({ title: doneWords(question, saved) });
      onClose();
    } catch (error) {
      setProblem(
        error instanceof ProblemError && error.status === 412
          ? "Somebody else changed this account meanwhile. Close this, look at it again, and repeat your change."
          : errorWords(error),
      );
    }
  }

  if (isSet) {
    return (
      <Dialog
        open
        onClose={onClose}
        title={`New password of ${person.name}`}
        description="Tell it to them; they can change it under Profile."
        actions={
          <Button kind="primary" onClick={onClose}>
            Done
          </Button>
        }
      >
        <div className="mt-3">
          <SecretOnce secret={password} />
        </div>
      </Dialog>
    );
  }
  return (
    <Dialog
      open
      onClose={onClose}
      title={`${title} ${person.name}`}
      description={
        isOwn && question !== "role" && question !== "activate"
          ? `${text} This is your own account.`
          : text
      }
      actions={
        <>
          <Button onClick={onClose}>Cancel</Button>
          <Button kind="primary" busy={change.isPending} onClick={() => void handleChange()}>
            {action}
          </Button>
        </>
      }
    >
      <div className="form-grid mt-3">
        {problem && <Notice tone="error" title={problem} />}
        {question === "role" && (
          <>
            <TextField
              label="Name"
              value={name}
              onChange={(event) => setName(event.target.value)}
            />
            <Select label="Role" value={role} options={roleOptions} onChange={setRole} />
          </>
        )}
        {question === "password" && (
          <PasswordField
            value={password}
            onChange={setPassword}
            onMake={() => setPassword(makePassword())}
          />
        )}
      </div>
    </Dialog>
  );
}

function doneWords(question: PersonQuestion, { name, role }: UserView): string {
  const done: Record<Exclude<PersonQuestion, "password">, string> = {
    role: `${name} is ${roleName(role).toLowerCase()}.`,
    signOut: `${name} is signed out everywhere.`,
    deactivate: `${name} is inactive.`,
    activate: `${name} is active again.`,
  };
  return question === "password" ? `${name} has a new password.` : done[question];
}
