/**
 * What the engine computes, part by part: model, where it holds, how it was tested, sources and limits. `tested` quotes
 * the tolerances that the named tests hold, so it changes with them.
 */
export interface MethodPart {
  readonly id: string;
  readonly title: string;
  readonly model: readonly string[];
  readonly holds: string;
  readonly tested: readonly { readonly words: string; readonly test: string }[];
  readonly sources: readonly string[];
  readonly limits: readonly string[];
}

export const methodParts: readonly MethodPart[] = [
  {
    id: 'sun',
    title: 'Where the sun stood',
    model: [
      'Azimuth and altitude come from the planetary theory of the Solar Position Algorithm, minute by minute, seen from the place itself, not from the centre of the earth. Altitude is given twice: airless, and as seen through the air at the pressure and temperature stated.',
      'Light travels along the direction as seen, so that one is used for beams and skylines. Sunrise and sunset are those of the upper edge of the disc on a level horizon.',
    ],
    holds: '1900 to 2100, every latitude. Below 5° of altitude refraction may differ by 0.1° or more from any formula.',
    tested: [
      { words: 'Within 0.0001° of the worked example of the published algorithm.', test: 'tests/handbook/sun.test.ts' },
      { words: 'Within 0.01° of independent positions between the polar circle and the equator.', test: 'tests/handbook/sun.test.ts' },
      { words: 'Within 0.15° of the zenith column of a station for a whole day; the column itself is of low precision.', test: 'tests/handbook/sky.test.ts' },
      { words: 'The fast scan of a year keeps within 0.000001° of the full chain.', test: 'tests/unit/physics/sun/sun-scan.test.ts' },
    ],
    sources: ['I. Reda and A. Andreas, Solar Position Algorithm for Solar Radiation Applications, NREL/TP-560-34302, 2003, revised 2008', 'Solar radius: IAU 2015 Resolution B3'],
    limits: ['The clock is often the weakest part: four minutes are one degree. State its error.'],
  },
  {
    id: 'sky',
    title: 'How strong the beam was',
    model: [
      'A measured series goes first, then one derived from measured global irradiance, then an hourly archive value. Where there is none, a clear sky is taken, with the median air of a climate class, after two models whose difference is shown.',
      'Beside the likely value stands the clean-air bound: no haze, little water, 5 % on top. Only the bound may refute; the likely value never does.',
    ],
    holds: 'Sun 3° up or higher. From 10° down to 6°, where the models part, the likely value goes over without a step to the lower of the two. No figure is given below 3°.',
    tested: [
      { words: 'Both models agree with the printed and library values of their authors and users: Bird within 0.1 %, Ineichen and Perez within 0.01 %.', test: 'tests/handbook/sky.test.ts' },
      { words: 'The bound lies above every good minute of a measured cloudless day at 2317 m, and above two thirds of it is reached with the sun over 15°.', test: 'tests/handbook/sky.test.ts' },
    ],
    sources: [
      'R. E. Bird and R. L. Hulstrom, SERI/TR-642-761, 1981',
      'P. Ineichen and R. Perez, Solar Energy 73, 2002',
      'Solar constant 1361.1 W/m²: C. A. Gueymard, Solar Energy 168, 2018',
      'Sunshine from 120 W/m²: World Meteorological Organization, WMO-No. 8',
    ],
    limits: ['A class is a median, not the day. A measured clean day lay 13 % above the mountain class.', 'The air of the classes is stated from memory: unverified.', 'An hourly mean can hide a clear gap of minutes.'],
  },
  {
    id: 'optics',
    title: 'Where the focus fell, and how bright',
    model: [
      'The optic is traced with rays: refraction and reflection with polarisation, absorption by spectral band, surface error, a limb-darkened sun of finite size. Balls, bottles, bowls, lenses, mirrors, dishes, curved faces and panes, flat grooved lenses and water on domes are of one tracer. A closed form of each kind stands beside it as a quick estimate and as a check.',
      'Openings, reveals, mullions and bars are given by their corners and stop rays one by one. The page says apart when any part of the optic lights the mark and when that light is focused there.',
      'Every flux names its disc (sun’s image, 1 mm, 5 mm), its centre (hot spot or surveyed mark) and its plane. A second answer is traced backwards from the target; where the two differ by more than their errors, that is said.',
    ],
    holds: 'The kinds of optic listed; shapes as measured. A run stops if energy or the limit of concentration is not kept.',
    tested: [
      { words: 'Spheres, lenses, mirrors, panes, bottles and bowls agree with rows of two independent ray tracers, within the tolerance of each row.', test: 'tests/handbook/trace-*.test.ts' },
      { words: 'The share that a bar or a reveal stops is the area that geometry gives by hand, within 0.5 %.', test: 'tests/unit/physics/occluders.test.ts' },
      { words: 'A flat pane 1 m wide lights a mark 6 m away for 38 minutes, as its width and the turn of the earth say.', test: 'tests/unit/physics/light-on-mark.test.ts' },
      { words: 'Closed forms against the same rows: within 5 % on axis for sphere, lens and mirror, 10 to 25 % off axis, 15 % for a bowed pane.', test: 'tests/handbook/optics-closed-form.test.ts' },
      { words: 'Limits of concentration, disc and image size, refractive indices and interface reflection against published figures.', test: 'tests/handbook/disc.test.ts, refractive-index.test.ts, fresnel.test.ts' },
    ],
    sources: [
      'M. Born and E. Wolf, Principles of Optics',
      'R. Winston, J. C. Miñano and P. Benítez, Nonimaging Optics, 2005',
      'D. Buie, A. G. Monger and C. J. Dey, Solar Energy 74, 2003 (sunshape)',
      'S. Timoshenko and S. Woinowsky-Krieger, Theory of Plates and Shells, 1959 (bow of panes)',
      'Glass: Lawrence Berkeley National Laboratory, WINDOW 4 library; weights: ASTM G173-03 direct',
    ],
    limits: ['Surface errors by kind, the bow of a pane and some reflectances are class values from memory: unverified, and listed under assumptions.', 'A class value in place of a measured focal length carries ±30 %.'],
  },
  {
    id: 'alignment',
    title: 'Whether the light met the mark',
    model: [
      'Each minute is judged in the order of the light: horizon, skyline, opening, working side of the optic, mark. One definite obstacle settles it. Without one, a doubt makes it "can’t tell". Values count as excluded beyond two of their ±.',
      'Backwards, the mark asks for one direction of the sun; the calendar lists the days and clock times on which that direction comes back, in the zone of the place, clock changes included.',
    ],
    holds: 'Windows of up to 14 days, calendars of up to five years. The calendar goes by the middle of the optic.',
    tested: [
      { words: 'Required direction within 0.02°, declination within 0.015°, best clock times within a minute of independent rows.', test: 'tests/handbook/alignment.test.ts' },
      { words: 'Speed of the spot within 0.2 %, dwell within 0.5 %.', test: 'tests/handbook/alignment.test.ts' },
    ],
    sources: ['Geometry; rate of the hour angle 15° per hour'],
    limits: ['The length of a line-shaped mark carries no time.', 'Without a skyline a "sunlit" minute holds only if nothing stood in front of the sun.', 'An optic that people move has no calendar.'],
  },
  {
    id: 'target',
    title: 'What the target may do',
    model: [
      'Softening, scorch, smoulder, flames and skin burn are separate answers, each with its own basis and sample size. Times to flames are read from measured tables by flux; scorch and softening come from a heat balance of a small spot, from fresh to charred surface.',
    ],
    holds: 'Materials on file. Measured samples are about 100 mm wide; a spot of a few millimetres loses heat faster and needs more.',
    tested: [
      { words: 'Conduction and balance within 0.1 % of published solutions.', test: 'tests/handbook/heating.test.ts' },
      { words: 'Times to ignition are the apparatus’s own at the measured fluxes.', test: 'tests/handbook/heating.test.ts' },
      { words: 'Second-degree burn within 3 % of the published curve.', test: 'tests/handbook/heating.test.ts' },
    ],
    sources: [
      'UL Research Institutes, FSRI Materials and Products Database, 2020 to 2025',
      'USDA Forest Products Laboratory, cone calorimeter datasets',
      'RISE / SP, cone calorimeter database, 2003',
      'R. M. Hadden et al., Fire Technology 50, 2014 (sample size)',
    ],
    limits: ['Where laboratories disagree the band is shown: one pine at one flux took 9 to 40 s.', 'Remembered critical fluxes are marked unverified.', 'No threshold for dry grass or litter was found; the engine then cannot tell.'],
  },
  {
    id: 'uncertainty',
    title: 'How sure the numbers are',
    model: [
      'Bearing, elevation, distance, clock, focal length, surface, air, glass and target are varied together by their ±, 4,096 times from a stated seed. Every sample reads a table of traces made beforehand, over the place in the track (and with it the incidence), focal length, distance, and place in the target’s plane.',
      'Given are the 5th, 50th and 95th of a hundred, the shares that align, pass a flux, or would ignite while the spot rests, what moves the answer most, and how far the median still moves from half of the samples to all.',
      'Equal input, seed and version give equal bytes. Input and result are kept with their hashes and never changed.',
    ],
    holds: 'The spread of what was entered. It knows nothing of what was entered wrongly.',
    tested: [
      { words: 'The table differs by less than 5 % from traces made at places between its nodes.', test: 'tests/unit/physics/trace-table.test.ts' },
      { words: 'Quantiles, seeds and repeats.', test: 'tests/unit/physics/uncertainty.test.ts, sobol.test.ts, normal-quantile.test.ts' },
      { words: 'The worker’s thread gives the same hash as the engine called directly.', test: 'tests/db/reconstructions/life-of-a-run.test.ts' },
    ],
    sources: ['S. Joe and F. Y. Kuo, SIAM J. Sci. Comput. 30, 2008', 'J. Matoušek, J. Complexity 14, 1998'],
    limits: ['A count of samples is no likelihood of a cause.'],
  },
  {
    id: 'words',
    title: 'What the engine says, and what it never says',
    model: [
      'Four tests (geometry, weather, energy, mark), each alone, without a total. One grade in words: consistent, not refuted, inconsistent because, cannot tell because. A check refutes only with the values that favour focused sunlight most: cleanest air, best minute inside the survey error, longest rest, darkest surface.',
      'It states no cause and gives no score. Causes are stated, reviewed and signed by people.',
    ],
    holds: 'Focused sunlight only. Other sources of heat are for people to examine.',
    tested: [{ words: 'Eight invented incidents, worked by hand with a separate algorithm, give the same trails, dates and refusals; only the four grade words occur.', test: 'tests/unit/physics/reconstruct.test.ts' }],
    sources: ['Own words'],
    limits: ['Ruling out everything else does not prove focused sunlight.'],
  },
];
