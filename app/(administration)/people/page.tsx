import type { Metadata } from "next";
import { requireActor } from "@/app/_server/session";
import { PeopleList } from "./_components/people-list";

export const metadata: Metadata = { title: "People" };

export default async function PeoplePage() {
  const actor = await requireActor("user.read");
  return <PeopleList ownId={actor.id} />;
}
