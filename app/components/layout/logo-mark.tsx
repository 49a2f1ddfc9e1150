/** The sign of the product: a small burn card, one dot and one burn. */
export function LogoMark() {
  return (
    <svg width="34" height="18" viewBox="0 0 34 18" aria-hidden="true" className="flex-none">
      <rect x="0.5" y="0.5" width="33" height="17" className="fill-card stroke-card-edge" />
      <path d="M6.5 1v16M13.5 1v16M20.5 1v16M27.5 1v16" className="stroke-card-rule" />
      <circle cx="4.6" cy="9" r="1.4" className="fill-slot" />
      <rect x="9" y="6.4" width="20" height="5.2" rx="2.6" className="fill-slot" />
    </svg>
  );
}
