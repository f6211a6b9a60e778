import { FluidTab } from "../_components/fluid-tab";

export default function FluidPage() {
  return <FluidTab />;
}
