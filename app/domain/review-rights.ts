import { canOnCase } from './permissions.ts';
import type { CaseSubject } from './permissions.ts';
import type { Actor } from './roles.ts';

/** The subject with authorship of any version, since nobody reviews what they had a hand in. */
export function withAuthorship(subject: CaseSubject, versions: readonly { readonly authorId: string }[], userId: string): CaseSubject {
  const wrote = versions.some((version) => version.authorId === userId);
  return wrote && !subject.relations.includes('author-of-finding') ? { ...subject, relations: [...subject.relations, 'author-of-finding'] } : subject;
}

/** Whether the person may settle a comment on a version by this author, while the finding is in work or in review. */
export function maySettleComment(actor: Actor, subject: CaseSubject, findingAuthorId: string): boolean {
  const atWork = subject.state === 'investigation' || subject.state === 'findings';
  if (!atWork || actor.organisationId !== subject.organisationId) return false;
  if (findingAuthorId === actor.userId) return true;
  // The rule of review itself holds in the findings state only; the same person may settle once it has gone back.
  return canOnCase(actor, 'finding:review', { ...subject, state: 'findings' });
}
