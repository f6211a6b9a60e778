import { currentActor } from "@/app/_server/session";
import { LinkButton } from "@/components/ui/button";
import { Page, PageHead } from "@/components/ui/section";

/** What a page shows to a role that it is not for: who is asking, and whom to ask. */
export async function ForbiddenPage() {
  const actor = await currentActor();
  return (
    <Page>
      <PageHead
        title="This page is not for your role"
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
