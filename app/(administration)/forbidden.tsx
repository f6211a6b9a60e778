import { currentActor } from "@/app/_server/session";
import { LinkButton } from "@/components/ui/button";
import { Page, PageHead } from "@/components/ui/section";

/** Says who may, so that a person knows whom to ask. */
export default async function Forbidden() {
  const actor = await currentActor();
  return (
    <Page>
      <PageHead
        title="This page is for administrators"
        lead={
          actor
            ? `You are signed in as ${actor.name}, ${actor.role}. Ask an administrator to do it for you, or to change your role.`
            : "Ask an administrator to do it for you."
        }
        actions={
          <LinkButton href="/portfolio" kind="primary">
            Go to the portfolio
          </LinkButton>
        }
      />
    </Page>
  );
}
