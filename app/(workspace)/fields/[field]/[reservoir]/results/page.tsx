import { ResultsTab } from "../_components/results-tab";

export default function ResultsPage() {
  return <ResultsTab />;
}
