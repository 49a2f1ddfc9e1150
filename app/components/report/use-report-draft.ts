import { useCallback, useEffect, useRef, useState } from 'react';
import type { RefObject } from 'react';
import { useNavigate } from 'react-router';
import { answersIn } from '#app/domain/report-fields.ts';
import type { KeptReport } from './device-store.ts';
import { listenForReports } from './device-store.ts';
import { fillForm, formValues } from './form-words.ts';
import { keepWords, patchReport, readReport, sweep } from './kept-reports.ts';
import { unfinishedReport } from './kept-views.ts';
import { newReportAddress } from './report-addresses.ts';

export interface ReportDraft {
  /** The report as this device keeps it; null before the first word. */
  readonly report: KeptReport | null;
  /** The device was asked what it keeps. */
  readonly asked: boolean;
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
  /** Call when something in the form has changed. Resolves when it is kept. */
  readonly keep: () => Promise<void>;
  readonly discard: () => Promise<void>;
}

interface Params {
  readonly form: RefObject<HTMLFormElement | null>;
  readonly clientId: string;
  readonly holderKey: string;
  readonly guestCode: string | null;
  /** Address of the report with this client id. */
  readonly addressOf: (clientId: string) => string;
  /** The server has sent the form back to be mended: its words are newer than the kept ones. */
  readonly mending: boolean;
  /** What the server filled in. */
  readonly first: Readonly<Record<string, string>>;
}

const clock = (ms: number) => new Date(ms).toLocaleTimeString('en-GB', { hour: '2-digit', minute: '2-digit' });

/** Keeps the words of the form on this device with every change, and puts them back after a reload. */
export function useReportDraft({ form, clientId, holderKey, guestCode, addressOf, mending, first }: Params): ReportDraft {
  const navigate = useNavigate();
  const [report, setReport] = useState<KeptReport | null>(null);
  const [asked, setAsked] = useState(false);
  const [unkept, setUnkept] = useState(false);
  const [begun, setBegun] = useState(mending);
  const [values, setValues] = useState<Readonly<Record<string, string>>>(first);
  const begunNow = useRef(mending);
  const writing = useRef<Promise<void> | null>(null);
  const again = useRef(false);

  /** One write at a time; words typed meanwhile go with the next. */
  const keep = useCallback((): Promise<void> => {
    if (form.current) setValues(formValues(form.current));
    again.current = true;
    writing.current ??= (async () => {
      while (again.current && form.current) {
        again.current = false;
        try {
          setReport(await keepWords({ clientId, holderKey, guestCode, begun: begunNow.current, values: formValues(form.current) }));
          setUnkept(false);
        } catch {
          // Full, or switched off.
          setUnkept(true);
        }
      }
    })().finally(() => {
      writing.current = null;
    });
    return writing.current;
  }, [form, clientId, holderKey, guestCode]);

  useEffect(() => {
    let left = false;
    const restore = async () => {
      await sweep();
      const kept = await readReport(clientId);
      const other = kept || mending ? null : await unfinishedReport(holderKey);
      if (left || !form.current) return;
      if (kept && kept.holderKey !== holderKey) {
        // Somebody else's words on this device: they stay theirs, and this person gets a report of their own.
        void navigate(newReportAddress(guestCode), { replace: true });
        return;
      }
      if (other) {
        // The unfinished report has its own photos; the page of its client id lists them.
        void navigate(addressOf(other), { replace: true });
        return;
      }
      if (kept) {
        if (!mending) fillForm(form.current, kept.values);
        begunNow.current = mending || kept.begun;
        setReport(kept);
        setBegun(begunNow.current);
      }
      setValues(formValues(form.current));
      setAsked(true);
    };
    restore().catch(() => {
      setUnkept(true);
      setAsked(true);
    });
    const listening = listenForReports((changed) => {
      if (changed === clientId) void readReport(clientId).then((now) => { if (!left && (now === null || now.holderKey === holderKey)) setReport(now); }, () => undefined);
    });
    return () => {
      left = true;
      listening();
    };
  }, [form, clientId, holderKey, guestCode, mending, navigate, addressOf]);

  return {
    report,
    asked,
    savedAt: report && !unkept ? clock(report.savedAt) : null,
    unkept,
    ...answersIn((name) => values[name] ?? ''),
    values,
    begun: begun || mending,
    begin: () => {
      begunNow.current = true;
      setBegun(true);
      void keep();
    },
    keep,
    discard: () => patchReport(clientId, { thrownAwayAt: Date.now() }),
  };
}
