import type { UserView } from "@/app/api/v1/users/schema";
import { Menu } from "@/components/ui/choice";
import { formatDate, MISSING } from "@/components/ui/format";
import { Icon } from "@/components/ui/icon";
import { ColumnHeading, LedgerTable } from "@/components/ui/table";
import { Flag } from "@/components/ui/text";
import type { PersonQuestion } from "./person-dialog";
import { roleName } from "./role-words";

export interface PeopleTableProps {
  people: readonly UserView[];
  ownId: string;
  onAsk: (person: UserView, question: PersonQuestion) => void;
}

export function PeopleTable({ people, ownId, onAsk }: PeopleTableProps) {
  return (
    <LedgerTable caption="People" density="executive" framed className="stacking-table">
      <thead>
        <tr>
          <ColumnHeading>Name</ColumnHeading>
          <ColumnHeading>Role</ColumnHeading>
          <ColumnHeading>E-mail</ColumnHeading>
          <ColumnHeading>Account</ColumnHeading>
          <ColumnHeading>Last signed in</ColumnHeading>
          <ColumnHeading>Added</ColumnHeading>
          <ColumnHeading align="right">Change</ColumnHeading>
        </tr>
      </thead>
      <tbody>
        {people.map((person) => (
          <tr key={person.id}>
            <th scope="row">
              {person.name}
              {person.id === ownId && <span className="unit"> you</span>}
            </th>
            <td>{roleName(person.role)}</td>
            <td>{person.email}</td>
            <td>{person.active ? <span className="soft">active</span> : <Flag>Inactive</Flag>}</td>
            <td data-label="Last signed in">
              {person.lastSignInAt ? formatDate(person.lastSignInAt, "time") : MISSING}
            </td>
            <td data-label="Added">{formatDate(person.createdAt)}</td>
            <td className="right">
              <Menu
                label={`Change ${person.name}`}
                align="end"
                buttonClassName="button button-small"
                button={
                  <>
                    Change <Icon name="chevron-down" size={9} />
                  </>
                }
                groups={[
                  {
                    entries: [
                      { label: "Name and role", onSelect: () => onAsk(person, "role") },
                      { label: "New password", onSelect: () => onAsk(person, "password") },
                      { label: "Sign out everywhere", onSelect: () => onAsk(person, "signOut") },
                      person.active
                        ? { label: "Make inactive", onSelect: () => onAsk(person, "deactivate") }
                        : { label: "Make active again", onSelect: () => onAsk(person, "activate") },
                    ],
                  },
                ]}
              />
            </td>
          </tr>
        ))}
      </tbody>
    </LedgerTable>
  );
}
