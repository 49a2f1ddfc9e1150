import { AppLink } from '#app/components/ui/app-link.tsx';
import { Cell, DataTable, GroupRow, HeadCell, Row, TableHead } from '#app/components/ui/data-table.tsx';
import { roleLabels, roleMeanings, roles } from '#app/domain/roles.ts';
import type { Role } from '#app/domain/roles.ts';
import { roleTable } from '#app/domain/role-table.ts';
import type { Right } from '#app/domain/role-table.ts';

const ground = (isChosen: boolean) => (isChosen ? 'tablet:bg-wash' : 'max-tablet:hidden');
const roleHref = (role: Role) => `/people?role=${role}#rights-heading`;

/**
 * The permission table as the server applies it. The head of a column chooses a role and shows what it means; on a phone
 * only the chosen role has a column, and the choice stands above the table.
 */
export function RoleTable({ chosen }: { readonly chosen: Role }) {
  return (
    <div className="gap-x-10 pt-1 desk:grid desk:grid-cols-[minmax(0,1fr)_260px]">
      <div className="min-w-0 max-desk:pb-5 desk:order-2 desk:border-l desk:border-hair desk:pl-6">
        <RoleChoice chosen={chosen} />
        <h3 className="pt-2 text-group font-semibold desk:border-t-[1.5px] desk:border-ink">{roleLabels[chosen]}</h3>
        <p className="pt-1">{roleMeanings[chosen]}</p>
      </div>
      <div className="min-w-0">
        <DataTable caption="What each role may do; a role for one site covers that site only">
          <TableHead>
            <HeadCell>Action</HeadCell>
            {roles.map((role) => (
              <HeadCell key={role} className={`min-w-[88px] !pl-1.5 ${ground(role === chosen)}`}>
                <AppLink href={roleHref(role)} className="inline-flex min-h-(--target-height) items-end" {...(role === chosen ? { 'aria-current': 'true' as const } : {})}>
                  {roleLabels[role]}
                </AppLink>
              </HeadCell>
            ))}
          </TableHead>
          {roleTable().map((group) => (
            <tbody key={group.heading}>
              <GroupRow columns={roles.length + 1}>{group.heading}</GroupRow>
              {group.rows.map((row) => (
                <Row key={row.words} tight>
                  <Cell heading className="min-w-[132px] !font-normal">{row.words}</Cell>
                  {roles.map((role) => (
                    <Cell key={role} className={`!pl-1.5 ${ground(role === chosen)}`}>
                      <RightMark right={row.rights[role]} />
                    </Cell>
                  ))}
                </Row>
              ))}
            </tbody>
          ))}
        </DataTable>
        <Key />
      </div>
    </div>
  );
}

function RoleChoice({ chosen }: { readonly chosen: Role }) {
  return (
    <nav aria-label="Choose a role" className="tablet:hidden">
      <ul className="flex flex-wrap gap-x-5">
        {roles.map((role) => (
          <li key={role}>
            <AppLink href={roleHref(role)} className={`inline-flex min-h-11 items-center ${role === chosen ? 'font-semibold' : ''}`} {...(role === chosen ? { 'aria-current': 'true' as const } : {})}>
              {roleLabels[role]}
            </AppLink>
          </li>
        ))}
      </ul>
    </nav>
  );
}

const said = { any: 'may', part: 'may, limited to', limit: 'may, but', no: 'may not' } as const;

function RightMark({ right }: { readonly right: Right }) {
  return (
    <span className="block text-axis">
      <Shape kind={right.kind} />
      <span className="sr-only">{said[right.kind]} </span>
      {'words' in right ? <span className="block text-second">{right.words}</span> : null}
    </span>
  );
}

/** Filled: any. Half: own or assigned. Open: with the limit named. Dash: no. */
function Shape({ kind }: { readonly kind: Right['kind'] }) {
  return (
    <svg width="14" height="14" viewBox="0 0 14 14" aria-hidden="true" className="my-0.5 inline-block stroke-ink" fill="none">
      {kind === 'no' ? <line x1="3.5" x2="10.5" y1="7" y2="7" strokeWidth="1.5" /> : <rect x="1.5" y="1.5" width="11" height="11" strokeWidth="1.5" className={kind === 'any' ? 'fill-ink' : ''} />}
      {kind === 'part' ? <path d="M1.5 12.5V1.5H12.5Z" className="fill-ink" stroke="none" /> : null}
    </svg>
  );
}

function Key() {
  return (
    <ul className="flex flex-wrap gap-x-6 gap-y-1 pt-3 text-axis text-second" aria-label="Signs of the table">
      {([['any', 'any case at the sites of the role'], ['part', 'only what is named'], ['limit', 'with the limit named'], ['no', 'no']] as const).map(([kind, words]) => (
        <li key={kind} className="flex items-center gap-2">
          <Shape kind={kind} />
          {words}
        </li>
      ))}
    </ul>
  );
}
