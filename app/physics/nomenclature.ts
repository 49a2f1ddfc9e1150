/**
 * Glossary of the engine: names, symbols, units and signs. The comments on fields elsewhere rely on it.
 *
 * Frame. Vectors are [east, north, up], right-handed. Azimuths and bearings run clockwise from true north, elevations
 * up from the horizontal. The vector of the sun ŝ points to the sun, a beam's direction points where the light goes.
 */
export interface Term {
  readonly name: string;
  readonly symbol: string;
  readonly unit: string;
  readonly meaning: string;
}

export const nomenclature: readonly Term[] = [
  { name: 'azimuth', symbol: 'A', unit: '°', meaning: 'clockwise from true north, 0…360' },
  { name: 'apparent elevation', symbol: 'h', unit: '°', meaning: 'of the sun’s centre, refraction included; light travels along apparent directions' },
  { name: 'airless elevation', symbol: 'h₀', unit: '°', meaning: 'topocentric, without atmosphere' },
  { name: 'declination', symbol: 'δ', unit: '°', meaning: 'topocentric, without refraction; a required declination has refraction taken away first' },
  { name: 'distance of the sun', symbol: 'R⊕', unit: 'au', meaning: 'geocentric' },
  { name: 'half-angle of the sun', symbol: 'θs', unit: 'rad', meaning: '0.2665° over R⊕' },
  { name: 'direct normal irradiance', symbol: 'DNI', unit: 'W/m²', meaning: 'within 2.5° of the sun’s centre; before any glass unless the name says at the optic' },
  { name: 'likely irradiance', symbol: '', unit: 'W/m²', meaning: 'measured where there is a record, else the median of the climate class under a clear sky' },
  { name: 'bound of irradiance', symbol: '', unit: 'W/m²', meaning: 'what the cleanest air could pass; the only figure that may refute' },
  { name: 'concentration', symbol: 'C', unit: 'suns', meaning: 'power through a disc over its area and the irradiance at the optic; losses in the optic and the receiver’s cosine included' },
  { name: 'flux', symbol: 'q', unit: 'kW/m²', meaning: 'concentration times irradiance at the optic, on a disc whose diameter, plane and centre are named' },
  { name: 'hot spot', symbol: '', unit: '', meaning: 'disc centred where its power is greatest in its plane' },
  { name: 'lateral miss', symbol: '', unit: 'mm', meaning: 'distance of the mark from the chief ray; for a line focus, across the line' },
  { name: 'axial miss', symbol: '', unit: 'mm', meaning: 'mark minus sharpest distance along the chief ray; positive beyond the focus' },
  { name: 'dwell', symbol: '', unit: 's', meaning: 'width of the contour above a flux along the trail, over the speed of the spot' },
  { name: 'solar absorptance', symbol: 'αs', unit: '', meaning: 'weighted with the direct solar spectrum; fresh and charred are two ends' },
];
