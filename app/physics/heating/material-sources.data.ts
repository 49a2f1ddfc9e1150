import type { SourceRef } from '#app/physics/model/stated.ts';

/** Sources that several material rows share. */
export const fsri: SourceRef = {
  text: 'UL Research Institutes, FSRI Materials and Products Database, 2020–2025, as collected in firemodels/exp', verified: true,
};
export const fpl: SourceRef = {
  text: 'USDA Forest Products Laboratory, cone calorimeter datasets, 2021 and earlier, as collected in firemodels/exp', verified: true,
};
export const rise: SourceRef = {
  text: 'RISE / SP (Sweden), cone calorimeter database, 2003, as collected in firemodels/exp', verified: true,
};
export const macfp: SourceRef = {
  text: 'MaCFP Condensed Phase group, material database, pine wood, 2026 snapshot', verified: true,
};
export const lift: SourceRef = {
  text: 'J. G. Quintiere and M. T. Harkleroad, LIFT apparatus, 1984 (attribution of the table from memory)', verified: false,
};
export const espr: SourceRef = {
  text: 'ESRU, University of Strathclyde, ESP-r materials database, 2019 file (handbook values)', verified: true,
};
export const polymer: SourceRef = {
  text: 'Polymer Science Learning Center, citing C. J. Hilado, Flammability Handbook for Plastics, 5th ed. 1998, p. 41–44', verified: true,
};
export const remembered: SourceRef = { text: 'from memory', verified: false };
export const siding: SourceRef = {
  text: 'Vinyl Siding Institute memo, 2002, as quoted in a glass maker’s bulletin, 2004', verified: true,
};
export const hadden: SourceRef = {
  text: 'R. M. Hadden et al., Radiant ignition of polyurethane foam: the effect of sample size, Fire Technology 50, 2014', verified: true,
};
