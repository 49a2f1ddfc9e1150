import tzLookup from 'tz-lookup';
import type { Place } from '#app/domain/coordinate-text.ts';

/** IANA zone of a position, from a table that ships with the application. */
export const zoneAt = ({ latitudeDeg, longitudeDeg }: Place): string => tzLookup(latitudeDeg, longitudeDeg);
