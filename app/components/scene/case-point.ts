/** One case on the register's map. Places are shown to two decimals at most. */
export interface CasePoint {
  readonly number: string;
  readonly title: string;
  readonly href: string;
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
  /** Beside the number where there is room, such as the return: `3 Aug, 19 d`. */
  readonly note?: string | null;
  /** The sun comes back before the fix is proven: the dot is filled. */
  readonly litBeforeFix?: boolean;
  /** Where the sun stood when the mark was made, degrees from true north clockwise. */
  readonly sunAzimuthDeg?: number | null;
}

export interface CaseMapProps {
  /** In order of weight: the first are the surest to keep their labels. */
  readonly points: readonly CasePoint[];
  /** Where the sun stands overhead at the moment shown: shades the night side and rules that parallel. */
  readonly sunOverhead?: { readonly latitudeDeg: number; readonly longitudeDeg: number } | null;
  /** Follows a link inside the application; without it the browser follows the link. */
  readonly onFollow?: (href: string) => void;
}
