/** A QR code as one path of unit squares; `size` is its side in squares. */
export interface QrPath {
  readonly size: number;
  readonly path: string;
}

export interface QrCodeProps {
  readonly code: QrPath;
  /** What it opens, for those who cannot see it. */
  readonly label: string;
  readonly className?: string;
}

/** Black on white in either theme, with the quiet zone of four squares that readers need (ISO/IEC 18004:2015, 5.3.8). */
export function QrCode({ code: { size, path }, label, className = '' }: QrCodeProps) {
  return (
    <svg viewBox={`-4 -4 ${size + 8} ${size + 8}`} className={className} role="img" aria-label={label} shapeRendering="crispEdges">
      <rect x="-4" y="-4" width={size + 8} height={size + 8} fill="#ffffff" />
      <path d={path} fill="#000000" />
    </svg>
  );
}
