import { Page } from "@/components/ui/section";
import { Skeleton } from "@/components/ui/status";

export default function Loading() {
  return (
    <Page>
      <Skeleton lines={12} label="Loading the page" />
    </Page>
  );
}
