import { LinkButton } from "@/components/ui/button";
import { Page, PageHead } from "@/components/ui/section";

export default function NotFound() {
  return (
    <Page>
      <PageHead
        title="There is no such page in the book"
        lead="It may have been renamed, or the address was cut short on its way here."
        actions={
          <>
            <LinkButton href="/fields">Find a field</LinkButton>
            <LinkButton href="/portfolio" kind="primary">
              Go to the portfolio
            </LinkButton>
          </>
        }
      />
    </Page>
  );
}
