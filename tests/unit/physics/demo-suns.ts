/**
 * Sun positions of invented incidents, computed by the author of the incidents with a separate low-precision algorithm
 * (about ±0.1°) and printed in whole degrees of azimuth and tenths of elevation.
 */
export const demoSuns: readonly {
  readonly name: string;
  readonly at: string;
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
  readonly azimuthDeg: number | null;
  readonly elevationDeg: number;
}[] = [
  { name: 'shaving mirror', at: '2025-12-14T12:10:00Z', latitudeDeg: 51.4, longitudeDeg: -2.9, azimuthDeg: 181, elevationDeg: 15.4 },
  { name: 'pool deck', at: '2025-09-20T12:15:00+02:00', latitudeDeg: -26.1, longitudeDeg: 32.9, azimuthDeg: 342, elevationDeg: 61.8 },
  { name: 'roof membrane', at: '2026-05-09T13:20:00+01:00', latitudeDeg: 53.5, longitudeDeg: -1.6, azimuthDeg: 187, elevationDeg: 53.8 },
  { name: 'vinyl siding', at: '2026-01-22T12:20:00-05:00', latitudeDeg: 42.9, longitudeDeg: -78.6, azimuthDeg: 178, elevationDeg: 27.6 },
  { name: 'water bottle', at: '2026-01-17T09:30:00+11:00', latitudeDeg: -33.9, longitudeDeg: 149.1, azimuthDeg: 90, elevationDeg: 39.3 },
  { name: 'telescope', at: '2026-06-13T16:05:00+02:00', latitudeDeg: 46.8, longitudeDeg: 8.9, azimuthDeg: 248, elevationDeg: 50.2 },
  { name: 'acrylic sphere', at: '2026-02-03T10:50:00+01:00', latitudeDeg: 55.7, longitudeDeg: 12.4, azimuthDeg: 157, elevationDeg: 15.2 },
  { name: 'dish', at: '2025-10-08T12:40:00+03:00', latitudeDeg: -1.3, longitudeDeg: 36.6, azimuthDeg: null, elevationDeg: 83 },
  { name: 'dry grass', at: '2025-07-29T15:40:00-07:00', latitudeDeg: 38.7, longitudeDeg: -120.9, azimuthDeg: 249, elevationDeg: 51.8 },
  { name: 'courtyard', at: '2026-04-18T15:10:00+03:00', latitudeDeg: 60.2, longitudeDeg: 24.7, azimuthDeg: 214, elevationDeg: 36.7 },
];
