import type { Metadata } from "next";
import { requireActor } from "@/app/_server/session";
import { Page, PageHead, Stack } from "@/components/ui/section";
import { methodGroups } from "./_components/catalogue";
import { MethodList } from "./_components/method-list";

export const metadata: Metadata = { title: "Methods and sources" };

export default async function MethodsPage() {
  await requireActor("session.read");
  return (
    <Page>
      <PageHead
        title="What every figure is worked out with"
        lead="Each method with its source, where it is valid, how good it is, and where the product uses it. “From memory” means that constants were written down without the paper at hand; the checks beside them say how they were confirmed."
      />
      <nav aria-label="Groups of methods" className="mb-8">
        <ul className="flex flex-wrap gap-x-6 gap-y-2">
          {methodGroups.map(({ id, title }) => (
            <li key={id}>
              <a href={`#${id}`}>{title}</a>
            </li>
          ))}
        </ul>
      </nav>
      <Stack>
        {methodGroups.map((group) => (
          <MethodList key={group.id} group={group} />
        ))}
      </Stack>
    </Page>
  );
}
