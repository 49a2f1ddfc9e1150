import { useCallback, useEffect, useRef, useState } from 'react';
import type { RefObject } from 'react';
import { fillForm, formValues } from '#app/components/report/form-words.ts';

/** What was typed into the form of a case and is not with the server yet, on this device. */
interface KeptForm {
  readonly savedAt: number;
  readonly baseVersion: number;
  /** Set once the form was sent; a newer version then means that it arrived. */
  readonly sent: boolean;
  readonly values: Readonly<Record<string, string>>;
}

export interface FormDraft {
  /** "15:12", once something is kept on this device; null before. */
  readonly savedAt: string | null;
  /** This device keeps nothing: the page says so. */
  readonly unkept: boolean;
  /** Version that older kept words were typed on; they wait to be put in or thrown away. */
  readonly olderVersion: number | null;
  readonly values: Readonly<Record<string, string>>;
  readonly keep: () => void;
  readonly markSent: () => void;
  readonly putIn: () => void;
  readonly throwAway: () => void;
}

interface Params {
  readonly form: RefObject<HTMLFormElement | null>;
  /** Of this form, this case and this person. */
  readonly storageKey: string;
  readonly baseVersion: number;
  /** The server has sent the form back to be mended: its words are newer than the kept ones. */
  readonly mending: boolean;
  readonly first: Readonly<Record<string, string>>;
}

const keptDays = 30;
const clock = (ms: number) => new Date(ms).toLocaleTimeString('en-GB', { hour: '2-digit', minute: '2-digit' });

function read(key: string): KeptForm | null {
  try {
    const value: unknown = JSON.parse(localStorage.getItem(key) ?? 'null');
    if (typeof value !== 'object' || value === null || !('savedAt' in value) || typeof value.savedAt !== 'number' || !('values' in value) || typeof value.values !== 'object' || value.values === null) return null;
    const values = Object.fromEntries(Object.entries(value.values).filter((entry): entry is [string, string] => typeof entry[1] === 'string'));
    return { savedAt: value.savedAt, baseVersion: 'baseVersion' in value ? Number(value.baseVersion) : 0, sent: 'sent' in value && value.sent === true, values };
  } catch {
    // Storage is switched off, or holds something else: nothing is kept then.
    return null;
  }
}

function write(key: string, kept: KeptForm | null): boolean {
  try {
    if (kept) localStorage.setItem(key, JSON.stringify(kept));
    else localStorage.removeItem(key);
    return true;
  } catch {
    // Full, or switched off.
    return false;
  }
}

/** Keeps what is typed into a form of a case on this device with every change, and puts it back after a reload. */
export function useFormDraft({ form, storageKey, baseVersion, mending, first }: Params): FormDraft {
  const [savedAt, setSavedAt] = useState<string | null>(null);
  const [unkept, setUnkept] = useState(false);
  const [older, setOlder] = useState<KeptForm | null>(null);
  const [values, setValues] = useState(first);
  const restored = useRef(false);

  const keepAs = useCallback(
    (sent: boolean) => {
      if (!form.current) return;
      const now = Date.now();
      const typed = formValues(form.current);
      const kept = write(storageKey, { savedAt: now, baseVersion, sent, values: typed });
      setUnkept(!kept);
      setSavedAt(kept ? clock(now) : null);
      setValues(typed);
    },
    [form, storageKey, baseVersion],
  );

  const fill = useCallback(
    (kept: KeptForm) => {
      if (!form.current) return;
      fillForm(form.current, kept.values);
      setSavedAt(clock(kept.savedAt));
      setValues(formValues(form.current));
    },
    [form],
  );

  useEffect(() => {
    if (restored.current || !form.current) return;
    restored.current = true;
    const kept = read(storageKey);
    if (!kept || mending) return;
    if (kept.savedAt < Date.now() - keptDays * 86_400_000 || (kept.sent && kept.baseVersion < baseVersion)) write(storageKey, null);
    else if (kept.baseVersion === baseVersion) fill(kept);
    else setOlder(kept);
  }, [form, storageKey, baseVersion, mending, fill]);

  return {
    savedAt,
    unkept,
    olderVersion: older?.baseVersion ?? null,
    values,
    keep: () => keepAs(false),
    markSent: () => keepAs(true),
    putIn: () => {
      if (!older) return;
      fill(older);
      setOlder(null);
    },
    throwAway: () => {
      write(storageKey, null);
      setOlder(null);
    },
  };
}
