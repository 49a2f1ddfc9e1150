/** Roles are granted per organisation, and optionally for one site only. */
export const roles = [
  'reporter',
  'investigator',
  'reviewer',
  'manager',
  'insurer',
  'privacy-lead',
  'administrator',
] as const;
export type Role = (typeof roles)[number];

export const roleLabels: Record<Role, string> = {
  reporter: 'Reporter',
  investigator: 'Investigator',
  reviewer: 'Technical reviewer',
  manager: 'Site manager',
  insurer: 'Insurer reader',
  'privacy-lead': 'Privacy lead',
  administrator: 'Administrator',
};

export const roleMeanings: Record<Role, string> = {
  reporter: 'Logs marks and near misses, and follows the reports that are their own.',
  investigator: 'Takes the first look, runs reconstructions, writes hypotheses and findings.',
  reviewer: 'Checks the findings of another person, sends them back or signs them.',
  manager: 'Owns corrective actions, closes cases, approves what leaves the house.',
  insurer: 'Reads the numbered releases addressed to their organisation, and nothing else.',
  'privacy-lead': 'Reads all personal and health fields, sets holds, prepares releases.',
  administrator: 'Looks after people, roles and sites. Does not read case content.',
};

export interface Grant {
  readonly role: Role;
  /** Null: every site of the organisation. */
  readonly siteId: string | null;
}

/** The signed-in person, as far as decisions need to know them. */
export interface Actor {
  readonly userId: string;
  readonly organisationId: string;
  readonly displayName: string;
  readonly email: string;
  readonly units: 'metric' | 'us';
  readonly grants: readonly Grant[];
}

/** Whether the actor holds one of the roles for this site. */
export function holdsRole(actor: Actor, wanted: readonly Role[], siteId: string | null): boolean {
  return actor.grants.some((grant) => wanted.includes(grant.role) && (grant.siteId === null || grant.siteId === siteId));
}

/** Whether the actor holds one of the roles anywhere. */
export function holdsRoleAnywhere(actor: Actor, wanted: readonly Role[]): boolean {
  return actor.grants.some((grant) => wanted.includes(grant.role));
}
