import { Cell, DataTable, HeadCell, Row, TableHead } from '#app/components/ui/data-table.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { roleLabels, roles } from '#app/domain/roles.ts';
import type { Role } from '#app/domain/roles.ts';

export interface SitePerson {
  readonly role: Role;
  readonly name: string;
  readonly onlyHere: boolean;
}

/** Who holds which role for a site, for those who look after it. */
export function SitePeople({ people }: { readonly people: readonly SitePerson[] }) {
  const inOrder = roles.flatMap((role) => people.filter((person) => person.role === role));
  return (
    <section aria-labelledby="site-people-heading" className="max-w-[720px] pt-10">
      <SectionHeading id="site-people-heading" note="seen by those who look after the site">People with this site</SectionHeading>
      <DataTable caption="People with a role for this site">
        <TableHead>
          <HeadCell>Role here</HeadCell>
          <HeadCell>Person</HeadCell>
          <HeadCell>Holds for</HeadCell>
        </TableHead>
        <tbody>
          {inOrder.map((person) => (
            <Row key={`${person.role} ${person.name} ${person.onlyHere}`} tight>
              <Cell heading>{roleLabels[person.role]}</Cell>
              <Cell>{person.name}</Cell>
              <Cell>{person.onlyHere ? 'this site' : 'all sites'}</Cell>
            </Row>
          ))}
        </tbody>
      </DataTable>
      <p className="pt-2 text-small text-second">An administrator adds and ends roles.</p>
    </section>
  );
}
