import { InputsTab } from "./_components/inputs-tab";

export default function InputsPage() {
  return <InputsTab />;
}
