import { useCallback, useEffect, useRef, useState } from 'react';
import type { RefObject } from 'react';
import { useNavigate } from 'react-router';
import { answersIn } from '#app/domain/report-fields.ts';
import { fillForm, formValues, readDraft, removeDraft, writeDraft } from './draft-store.ts';

export interface ReportDraft {
  /** "15:12", once something is kept on this device; null before. */
  readonly savedAt: string | null;
  /** This device keeps nothing: the page says so. */
  readonly unkept: boolean;
  readonly answered: number;
  readonly missing: string | null;
  /** What the form holds, by field name. */
  readonly values: Readonly<Record<string, string>>;
  /** Past the make-safe card. */
  readonly begun: boolean;
  readonly begin: () => void;
  /** Call when something in the form has changed. */
  readonly keep: () => void;
  readonly discard: () => void;
}

interface Params {
  readonly form: RefObject<HTMLFormElement | null>;
  readonly clientId: string;
  readonly holderKey: string;
  /** Address of the report with this client id. */
  readonly addressOf: (clientId: string) => string;
  /** The server has sent the form back to be mended: its words are newer than the kept ones. */
  readonly mending: boolean;
  /** What the server filled in. */
  readonly first: Readonly<Record<string, string>>;
}

const clock = (ms: number) => new Date(ms).toLocaleTimeString('en-GB', { hour: '2-digit', minute: '2-digit' });

/** Keeps the words of the form on this device with every change, and puts them back after a reload. */
export function useReportDraft({ form, clientId, holderKey, addressOf, mending, first }: Params): ReportDraft {
  const navigate = useNavigate();
  const [savedAt, setSavedAt] = useState<string | null>(null);
  const [unkept, setUnkept] = useState(false);
  const [begun, setBegun] = useState(mending);
  const [values, setValues] = useState<Readonly<Record<string, string>>>(first);
  const restored = useRef(false);

  const count = useCallback(() => {
    if (!form.current) return;
    setValues(formValues(form.current));
  }, [form]);

  const write = useCallback(
    (isBegun: boolean) => {
      if (!form.current) return;
      const now = Date.now();
      const kept = writeDraft(holderKey, { clientId, savedAt: now, begun: isBegun, values: formValues(form.current) });
      setUnkept(!kept);
      setSavedAt(kept ? clock(now) : null);
      count();
    },
    [form, clientId, holderKey, count],
  );

  useEffect(() => {
    if (restored.current || !form.current) return;
    restored.current = true;
    const draft = mending ? null : readDraft(holderKey);
    if (draft && draft.clientId !== clientId) {
      // The draft has its own photos on the server; the page of its client id lists them.
      restored.current = false;
      void navigate(addressOf(draft.clientId), { replace: true });
      return;
    }
    if (draft) {
      fillForm(form.current, draft.values);
      setSavedAt(clock(draft.savedAt));
      setBegun(draft.begun);
    }
    count();
  }, [form, clientId, holderKey, mending, navigate, addressOf, count]);

  return {
    savedAt,
    unkept,
    ...answersIn((name) => values[name] ?? ''),
    values,
    begun: begun || mending,
    begin: () => {
      setBegun(true);
      write(true);
      // Browsers may clear storage when space runs short; this asks them not to.
      void navigator.storage?.persist?.().catch(() => false);
    },
    keep: () => write(begun || mending),
    discard: () => removeDraft(holderKey),
  };
}
