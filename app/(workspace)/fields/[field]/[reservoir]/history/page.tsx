import { HistoryTab } from "../_components/history-tab";

export default function HistoryPage() {
  return <HistoryTab />;
}
