import { CompareTab } from "../_components/compare-tab";

export default function ComparePage() {
  return <CompareTab />;
}
