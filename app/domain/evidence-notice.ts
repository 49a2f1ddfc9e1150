/** Notices about an item or a planned examination to other parties, and what they answered: words and rules. */

/** Whom a notice goes to, by part in the matter. Pages and reports name the part; the person stands beside it in the house only. */
export const partyRoles = ['owner', 'occupier', 'insurer', 'maker', 'supplier', 'injured-person', 'fire-service', 'police', 'other-party'] as const;
export type PartyRole = (typeof partyRoles)[number];
export const partyRoleLabels: Record<PartyRole, string> = {
  owner: 'Owner',
  occupier: 'Occupier of the place',
  insurer: 'Insurer',
  maker: 'Maker',
  supplier: 'Supplier or installer',
  'injured-person': 'Injured person',
  'fire-service': 'Fire service',
  police: 'Police',
  'other-party': 'Other party',
};

export const noticeWays = ['email', 'letter', 'in-person', 'telephone', 'other'] as const;
export type NoticeWay = (typeof noticeWays)[number];
export const noticeWayLabels: Record<NoticeWay, string> = {
  email: 'E-mail',
  letter: 'Letter',
  'in-person': 'In person',
  telephone: 'Telephone',
  other: 'Another way',
};

/** A party that said nothing has no answer at all. */
export const noticeAnswers = ['agrees', 'asks-to-attend', 'objects'] as const;
export type NoticeAnswer = (typeof noticeAnswers)[number];
export const noticeAnswerLabels: Record<NoticeAnswer, string> = {
  agrees: 'Agrees',
  'asks-to-attend': 'Asks to be present',
  objects: 'Objects',
};

export interface AnswerFacts {
  readonly answer: NoticeAnswer;
  readonly note: string;
  readonly answeredAt: Date;
}

export interface NoticeFacts {
  readonly id: string;
  /** Null: about the item as a whole. */
  readonly planId: string | null;
  readonly partyRole: PartyRole;
  readonly toWhom: string;
  readonly way: NoticeWay;
  readonly sentAt: Date;
  /** In the order in which they were recorded. */
  readonly answers: readonly AnswerFacts[];
}

/** `owner, insurer, maker`: each part once, in the order of our list. */
export const partyList = (roles: readonly PartyRole[]): string => partyRoles.filter((role) => roles.includes(role)).map((role) => partyRoleLabels[role].toLowerCase()).join(', ');

/** The answer that holds at a moment: the newest that had come by then, and of two of one time the one recorded later. */
export function standingAnswer({ answers }: Pick<NoticeFacts, 'answers'>, at: Date): AnswerFacts | null {
  const come = answers.filter((one) => one.answeredAt.getTime() <= at.getTime());
  return come.reduce<AnswerFacts | null>((newest, one) => (newest === null || one.answeredAt.getTime() >= newest.answeredAt.getTime() ? one : newest), null);
}

/** Notices whose party objects at that moment. */
export const objections = (notices: readonly NoticeFacts[], at: Date): NoticeFacts[] => notices.filter((notice) => standingAnswer(notice, at)?.answer === 'objects');

/** Why a notice sent at this moment cannot be recorded, by field. */
export function noticeObstacles(sentAt: Date, now: Date): Record<string, string[]> {
  return sentAt.getTime() > now.getTime() ? { sentAt: ['This is still to come. Record a notice when it has been sent.'] } : {};
}

/** Why an answer that came at this moment cannot be recorded, by field. */
export function answerObstacles(answeredAt: Date, sentAt: Date, now: Date): Record<string, string[]> {
  if (answeredAt.getTime() > now.getTime()) return { answeredAt: ['This is still to come. Check the day and the time.'] };
  return answeredAt.getTime() < sentAt.getTime() ? { answeredAt: ['An answer comes after the notice. Check the day and the time.'] } : {};
}
