declare module 'tz-lookup' {
  /** IANA zone of a position, offline. Throws RangeError for a position that is none. */
  export default function tzLookup(latitudeDeg: number, longitudeDeg: number): string;
}
