"use client";

import { useState } from "react";

import { ReadError } from "@/app/_client/read-error";
import { countWord } from "@/app/_client/words";
import type { UserView } from "@/app/api/v1/users/schema";
import { Button } from "@/components/ui/button";
import { SearchField } from "@/components/ui/field";
import { Page, PageHead } from "@/components/ui/section";
import { EmptyState, Skeleton } from "@/components/ui/status";
import { useUsers } from "../_queries/users";
import { AddPersonDialog } from "./add-person-dialog";
import { PeopleTable } from "./people-table";
import { PersonDialog, type PersonQuestion } from "./person-dialog";

interface Asked {
  person: UserView;
  question: PersonQuestion;
}

/** Accounts: who is here, in what role, and whether they still come in. */
export function PeopleList({ ownId }: { ownId: string }) {
  const { data, error, refetch } = useUsers(0);
  const [isAdding, setIsAdding] = useState(false);
  const [asked, setAsked] = useState<Asked | null>(null);
  const [search, setSearch] = useState("");

  const add = (
    <Button kind="primary" icon="plus" onClick={() => setIsAdding(true)}>
      Add a person
    </Button>
  );
  const wanted = search.trim().toLowerCase();
  const people = (data?.items ?? []).filter(({ name, email }) =>
    `${name} ${email}`.toLowerCase().includes(wanted),
  );
  return (
    <Page>
      <PageHead
        title={titleOf(data?.items)}
        lead="A new role counts from a person’s next click. An inactive account keeps its history and cannot sign in."
        actions={add}
      />
      {!data && !error && <Skeleton lines={8} label="Loading the people" />}
      {error && (
        <ReadError error={error} onRetry={refetch}>
          The accounts are kept; only this list could not be read.
        </ReadError>
      )}
      {data && (
        <>
          <div className="filter-bar">
            <SearchField
              label="Find a person"
              value={search}
              onChange={(event) => setSearch(event.target.value)}
            />
          </div>
          {data.items.length === 1 && (
            <EmptyState title="You are the only one here" action={add}>
              Add an engineer to enter reservoirs, a reviewer to approve them, and a planner for
              interests and prices.
            </EmptyState>
          )}
          {people.length === 0 ? (
            <EmptyState
              title="Nobody by that name"
              action={<Button onClick={() => setSearch("")}>Show everybody</Button>}
            />
          ) : (
            <PeopleTable
              people={people}
              ownId={ownId}
              onAsk={(person, question) => setAsked({ person, question })}
            />
          )}
          {data.total > data.items.length && (
            <p className="pager">
              {data.items.length} of {data.total} accounts are shown. Find the others by name.
            </p>
          )}
        </>
      )}
      {isAdding && <AddPersonDialog onClose={() => setIsAdding(false)} />}
      {asked && (
        <PersonDialog
          key={`${asked.person.id} ${asked.question}`}
          {...asked}
          isOwn={asked.person.id === ownId}
          onClose={() => setAsked(null)}
        />
      )}
    </Page>
  );
}

function titleOf(people: readonly UserView[] | undefined): string {
  if (!people) return "People";
  const active = people.filter((person) => person.active).length;
  const inactive = people.length - active;
  const head =
    active === 1 ? "One person has an account" : `${countWord(active)} people have an account`;
  return inactive === 0 ? head : `${head}, ${inactive} ${inactive === 1 ? "is" : "are"} inactive`;
}
