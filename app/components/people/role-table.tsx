import { Cell, DataTable, HeadCell, Row, TableHead } from '#app/components/ui/data-table.tsx';
import { roleLabels, roleMeanings, roles } from '#app/domain/roles.ts';
import { roleTable } from '#app/domain/role-table.ts';

const shownRoles = roles.filter((role) => role !== 'insurer');

/** The permission table as the server applies it: a filled square may, a dash may not. */
export function RoleTable() {
  return (
    <div className="space-y-5 pt-3">
      <dl className="grid gap-x-10 gap-y-2 desk:grid-cols-2">
        {roles.map((role) => (
          <div key={role}>
            <dt className="font-semibold">{roleLabels[role]}</dt>
            <dd className="text-second">{roleMeanings[role]}</dd>
          </div>
        ))}
      </dl>
      <DataTable caption="Actions by role; a role for one site covers that site only">
        <TableHead>
          <HeadCell>Action</HeadCell>
          {shownRoles.map((role) => <HeadCell key={role}>{roleLabels[role]}</HeadCell>)}
          <HeadCell>Also, or not</HeadCell>
        </TableHead>
        <tbody>
          {roleTable().map((row) => (
            <Row key={row.action} tight>
              <Cell heading>{row.words}</Cell>
              {shownRoles.map((role) => (
                <Cell key={role}>
                  <Right may={row.roles.includes(role)} />
                </Cell>
              ))}
              <Cell>{row.relations}</Cell>
            </Row>
          ))}
        </tbody>
      </DataTable>
    </div>
  );
}

function Right({ may }: { readonly may: boolean }) {
  return (
    <svg width="14" height="14" viewBox="0 0 14 14" role="img" aria-label={may ? 'may' : 'may not'} className="fill-ink stroke-ink">
      {may ? <rect x="2" y="2" width="10" height="10" /> : <line x1="3" x2="11" y1="7" y2="7" strokeWidth="1.5" />}
    </svg>
  );
}
