/**
 * The words of a report under way, kept on this device until they are with the team. One draft per holder, so that two
 * people on one phone do not meet each other's words.
 */
export interface Draft {
  readonly clientId: string;
  readonly savedAt: number;
  /** Whether the person has left the make-safe card. */
  readonly begun: boolean;
  readonly values: Readonly<Record<string, string>>;
}

/** Drafts are kept this long after the last word. */
export const draftDays = 14;
const prefix = 'scorchline.report.';

const keyOf = (holderKey: string) => `${prefix}${holderKey}`;

function isDraft(value: unknown): value is Draft {
  return typeof value === 'object' && value !== null && 'clientId' in value && typeof value.clientId === 'string' && 'savedAt' in value && typeof value.savedAt === 'number' && 'values' in value;
}

function readKey(key: string): Draft | null {
  try {
    const value: unknown = JSON.parse(localStorage.getItem(key) ?? 'null');
    return isDraft(value) ? value : null;
  } catch {
    // Storage is switched off, or holds something else: there is no draft then.
    return null;
  }
}

/** The draft of this holder, if one is young enough. Older ones of anybody are removed. */
export function readDraft(holderKey: string): Draft | null {
  const oldest = Date.now() - draftDays * 86_400_000;
  for (const key of draftKeys()) {
    const draft = readKey(key);
    if (!draft || draft.savedAt < oldest) localStorage.removeItem(key);
  }
  return readKey(keyOf(holderKey));
}

/** @returns false when this device keeps nothing, so that the page can say so. */
export function writeDraft(holderKey: string, draft: Draft): boolean {
  try {
    localStorage.setItem(keyOf(holderKey), JSON.stringify(draft));
    return true;
  } catch {
    // Full, or switched off.
    return false;
  }
}

export function removeDraft(holderKey: string): void {
  try {
    localStorage.removeItem(keyOf(holderKey));
  } catch {
    // Without storage there is nothing to remove.
  }
}

/** Removes the draft of a report that the team has acknowledged, whoever's it was. */
export function removeSentDraft(clientId: string): void {
  for (const key of draftKeys()) if (readKey(key)?.clientId === clientId) localStorage.removeItem(key);
}

function draftKeys(): string[] {
  try {
    return Object.keys(localStorage).filter((key) => key.startsWith(prefix));
  } catch {
    // As above: no storage, no drafts.
    return [];
  }
}

/** What a form holds, by field name; files and fields that name the report itself are left out. */
export function formValues(form: HTMLFormElement): Record<string, string> {
  const values: Record<string, string> = {};
  for (const [name, value] of new FormData(form)) if (typeof value === 'string' && name !== 'clientId' && name !== 'intent') values[name] = value;
  return values;
}

/** Puts kept words back into the fields of the page. */
export function fillForm(form: HTMLFormElement, values: Readonly<Record<string, string>>): void {
  for (const element of form.elements) {
    if (element instanceof HTMLInputElement && (element.type === 'radio' || element.type === 'checkbox')) {
      if (element.name in values) element.checked = values[element.name] === element.value;
    } else if (element instanceof HTMLInputElement || element instanceof HTMLTextAreaElement || element instanceof HTMLSelectElement) {
      const fixed = element instanceof HTMLInputElement && (element.type === 'file' || (element.type === 'hidden' && element.name !== 'foundNowAt' && element.name !== 'accuracyM'));
      const kept = values[element.name];
      if (!fixed && kept !== undefined) element.value = kept;
    }
  }
}
