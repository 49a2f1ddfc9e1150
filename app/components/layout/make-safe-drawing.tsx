/** A covered ball on a stand, the mark on the ground, and a person who comes from the shaded side. */
export function MakeSafeDrawing() {
  return (
    <svg viewBox="0 0 358 128" className="block w-full max-w-[440px]" role="img" aria-label="Someone comes from the shaded side and lays a cover over the round glass, away from the mark.">
      <g className="fill-none stroke-clear" strokeWidth="1.2">
        <path d="M0 4 118 40M20 2 112 30M0 32 108 66" />
        <path d="M164 74 246 99" strokeDasharray="2 5" />
      </g>
      <circle cx="140" cy="69" r="26" className="fill-none stroke-ink" strokeWidth="1.9" />
      <path d="M103 90C99 44 118 32 138 32c18 0 28 10 33 20Z" className="fill-card stroke-ink" strokeWidth="1.9" strokeLinejoin="round" />
      <path d="M106 84C110 54 132 38 166 50" className="fill-none stroke-card-rule" strokeWidth="1.2" />
      <g className="fill-none stroke-ink" strokeWidth="1.9" strokeLinecap="round" strokeLinejoin="round">
        <path d="M134 94 128 106M148 94l6 12M0 106h358" />
        <circle cx="300" cy="42" r="8" />
        <path d="M300 50v30M300 56l-40-12M300 56l12 18M300 80l-9 26M300 80l10 26" />
        <path d="M256 43.6 176 48" strokeDasharray="5 4" />
      </g>
      <rect x="240" y="103.5" width="20" height="5" className="fill-burn" />
      <g className="fill-none stroke-second" strokeWidth="1.2">
        <path d="M342 121h-54" />
        <path d="m282 121 7-3.5v7Z" className="fill-second" />
      </g>
    </svg>
  );
}
