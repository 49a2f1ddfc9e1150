import { useId } from 'react';

/** The same line again and again across a page, faint and slanted; the footer says it in words. Needs a positioned parent. */
export function Watermark({ line }: { readonly line: string }) {
  const id = useId();
  const width = Math.max(360, line.length * 7.6 + 60);
  return (
    <svg aria-hidden="true" focusable="false" className="pointer-events-none absolute inset-0 h-full w-full overflow-hidden text-ink opacity-6 select-none">
      <defs>
        <pattern id={id} width={width} height="190" patternUnits="userSpaceOnUse" patternTransform="rotate(-24)">
          <text x="20" y="60" fontSize="14" fill="currentColor">{line}</text>
          <text x={20 - width / 2} y="155" fontSize="14" fill="currentColor">{line}</text>
          <text x={20 + width / 2} y="155" fontSize="14" fill="currentColor">{line}</text>
        </pattern>
      </defs>
      <rect width="100%" height="100%" fill={`url(#${id})`} />
    </svg>
  );
}
