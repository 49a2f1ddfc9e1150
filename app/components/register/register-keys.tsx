import { useEffect, useState } from 'react';

const storageKey = 'scorchline-register-keys';
const isTyping = (target: EventTarget | null) => target instanceof HTMLElement && (target.isContentEditable || /^(?:INPUT|SELECT|TEXTAREA)$/u.test(target.tagName));

function moveFocus(step: 1 | -1): void {
  const links = [...document.querySelectorAll<HTMLAnchorElement>('[data-row-link]')];
  const at = links.findIndex((link) => link === document.activeElement);
  const next = links[at === -1 ? (step === 1 ? 0 : links.length - 1) : Math.min(links.length - 1, Math.max(0, at + step))];
  next?.focus();
}

/** j and k go down and up the rows, / goes to the search. They can be turned off, and do nothing while somebody types. */
export function RegisterKeys() {
  const [on, setOn] = useState<boolean | null>(null);
  useEffect(() => {
    setOn(window.localStorage.getItem(storageKey) !== 'off');
  }, []);
  useEffect(() => {
    if (!on) return undefined;
    const listen = (event: KeyboardEvent) => {
      if (event.ctrlKey || event.metaKey || event.altKey || isTyping(event.target)) return;
      if (event.key === 'j') moveFocus(1);
      else if (event.key === 'k') moveFocus(-1);
      else if (event.key === '/') document.querySelector<HTMLInputElement>('[data-find]')?.focus();
      else return;
      event.preventDefault();
    };
    document.addEventListener('keydown', listen);
    return () => document.removeEventListener('keydown', listen);
  }, [on]);
  if (on === null) return null;
  const toggle = () => {
    window.localStorage.setItem(storageKey, on ? 'off' : 'on');
    setOn(!on);
  };
  return (
    <p className="pt-6 text-axis text-second max-tablet:hidden" data-print="no">
      {on ? 'Keys: j and k move through the rows, Enter opens, / finds.' : 'Keys are off.'}{' '}
      <button type="button" onClick={toggle} className="min-h-6 cursor-pointer underline decoration-ember decoration-2 underline-offset-4">{on ? 'Turn them off' : 'Turn them on'}</button>
    </p>
  );
}
