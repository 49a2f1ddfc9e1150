/** How somebody belongs to a place. Class personal. */
export const personRelations = ['employee', 'contractor', 'visitor', 'resident', 'pupil', 'member-of-public'] as const;
export type PersonRelation = (typeof personRelations)[number];
export const personRelationLabels: Record<PersonRelation, string> = {
  employee: 'Works here',
  contractor: 'Contractor',
  visitor: 'Visitor',
  resident: 'Lives here',
  pupil: 'Pupil',
  'member-of-public': 'Passer-by',
};
