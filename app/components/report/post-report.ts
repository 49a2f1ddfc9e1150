import type { Answer, Post } from './report-sender.ts';

/** Whose report this is: the team's side takes it in nobody else's name. */
export const holderHeader = 'Scorchline-Holder';

/** Without a sign of life for this long the connection counts as gone. [ms] */
const silenceMs = 60_000;
const nothing: Answer = { status: 0, text: '' };

/** From a page: can say how far it is. */
export function postFromPage({ address, holderKey, form, onProgress }: Post): Promise<Answer> {
  if (!navigator.onLine) return Promise.resolve(nothing);
  return new Promise((resolve) => {
    const request = new XMLHttpRequest();
    let silence = 0;
    const alive = () => {
      window.clearTimeout(silence);
      silence = window.setTimeout(() => request.abort(), silenceMs);
    };
    const end = (answer: Answer) => {
      window.clearTimeout(silence);
      resolve(answer);
    };
    request.open('POST', address);
    request.responseType = 'text';
    request.setRequestHeader(holderHeader, holderKey);
    request.upload.onprogress = (event) => {
      alive();
      onProgress?.(event.lengthComputable ? event.loaded / event.total : 0);
    };
    request.onerror = () => end(nothing);
    request.onabort = () => end(nothing);
    request.onload = () => end({ status: request.status, text: request.responseText });
    alive();
    request.send(form);
  });
}

/** From the service worker, when no page is open. */
export async function postFromWorker({ address, holderKey, form }: Post): Promise<Answer> {
  try {
    const answer = await fetch(address, { method: 'POST', body: form, headers: { [holderHeader]: holderKey }, signal: AbortSignal.timeout(5 * silenceMs) });
    return { status: answer.status, text: await answer.text() };
  } catch {
    // No connection, or none that reaches the team.
    return nothing;
  }
}
