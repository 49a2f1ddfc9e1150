/**
 * Direct normal irradiance of one cloudless day, measured: clock in UTC and W/m², one minute's value every ten minutes,
 * faultless minutes only. The whole day by the minute is compared in tests/handbook/sky.test.ts.
 */
export const clearDay = {
  place: { latitudeDeg: 37.7, longitudeDeg: -105.92, elevationM: 2317, heightAboveGroundM: 0, zone: 'America/Denver' },
  on: '2016-01-01',
  /** Means of the day's own record. */
  pressureHpa: 777.8,
  temperatureC: -8.8,
  source: 'NOAA Global Monitoring Laboratory, SURFRAD network, Alamosa, Colorado, 1 January 2016, one-minute record',
} as const;

export const clearDayWm2: readonly (readonly [clock: string, wm2: number])[] = [
  ['14:30', 299], ['14:40', 449], ['14:50', 557], ['15:00', 371], ['15:10', 722], ['15:20', 781], ['15:30', 820],
  ['15:40', 857], ['15:50', 892], ['16:00', 921], ['16:10', 944], ['16:20', 964], ['16:30', 982], ['16:40', 1000],
  ['16:50', 1015], ['17:00', 1025], ['17:10', 1030], ['17:20', 1040], ['17:30', 1045], ['17:40', 1048],
  ['17:50', 1056], ['18:00', 1064], ['18:10', 1068], ['18:20', 1068], ['18:30', 1070], ['18:40', 1072],
  ['18:50', 1072], ['19:00', 1075], ['19:10', 1073], ['19:20', 1073], ['19:30', 1073], ['19:40', 1069],
  ['19:50', 1063], ['20:00', 1063], ['20:10', 1063], ['20:20', 1059], ['20:30', 1051], ['20:40', 1045],
  ['20:50', 1039], ['21:00', 1032], ['21:10', 1020], ['21:20', 1009], ['21:30', 999], ['21:40', 989], ['21:50', 968],
  ['22:00', 946], ['22:10', 925], ['22:20', 899], ['22:30', 868], ['22:40', 834], ['22:50', 795], ['23:00', 747],
  ['23:10', 690], ['23:20', 616], ['23:30', 521], ['23:40', 322], ['23:50', 1],
];
