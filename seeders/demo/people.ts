import type { Role } from "@/services/policy";

/** One invented person a role. The password is public: it opens the demo and nothing else. */
export const demoPassword = "dew-ledger-2027";

export interface DemoPerson {
  name: string;
  email: string;
  role: Role;
}

export const demoPeople: DemoPerson[] = [
  { name: "Joss Pemberlea", email: "joss.pemberlea@quillmere.example", role: "administrator" },
  { name: "Ines Okonrae", email: "ines.okonrae@quillmere.example", role: "engineer" },
  { name: "Tobias Falkmere", email: "tobias.falkmere@quillmere.example", role: "reviewer" },
  { name: "Marit Sundeholt", email: "marit.sundeholt@quillmere.example", role: "planner" },
  { name: "Ruth Calderwyn", email: "ruth.calderwyn@quillmere.example", role: "executive" },
];
