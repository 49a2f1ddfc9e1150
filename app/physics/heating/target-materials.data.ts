import { espr, fpl, fsri, hadden, lift, macfp, polymer, remembered, rise, siding } from './material-sources.data.ts';
import type { Provenance, Sourced, TargetMaterial } from './target-material.ts';

/** Char of wood: reflectance spectra of the MaCFP pine, greyish partly converted char at the low end. */
const char: Sourced = { low: 0.68, high: 0.92, rowIds: ['macfp-char-refl-20', 'macfp-char-refl-40', 'macfp-char-refl-60'], source: macfp };

const sourced = (low: number, high: number, source: Sourced['source'], ...rowIds: string[]): Sourced => ({ low, high, rowIds, source });

const thermal = (source: Sourced['source'], ...rowIds: string[]): Provenance => ({ rowIds, source });

/** What most rows leave open. */
const unknown = {
  absorptanceCharred: null, conductivityWmk: null, densityKgm3: null, heatCapacityJkgk: null, thermalSource: null, thicknessM: null,
  softeningC: null, chars: false, smoulder: null, ignition: [], criticalFlux: null, absorbsInDepth: false, burnsSkin: false,
} satisfies Partial<TargetMaterial>;

const textiles = {
  'curtain-fabric': {
    ...unknown,
    name: 'curtain fabric, cotton',
    absorptanceFresh: sourced(0.25, 0.5, remembered),
    absorptanceCharred: char,
    conductivityWmk: 0.071, densityKgm3: 263, heatCapacityJkgk: 1564,
    thermalSource: thermal(fsri, 'fsri-k-cotton-rug', 'fsri-rho-cotton-rug', 'fsri-c-cotton-rug'),
    thicknessM: 0.0005,
    chars: true,
    ignition: [
      {
        product: 'cotton sheet 0.19 mm', points: [[25, 10.75], [50, 3]],
        rowIds: ['raw-tig-cotton-sheet-0-19-mm-25', 'raw-tig-cotton-sheet-0-19-mm-50'], source: fsri,
      },
      {
        product: 'raw cotton', points: [[25, 33.3], [35, 6.2], [75, 2.9]],
        rowIds: ['tig-fsri-cotton-raw-25', 'tig-fsri-cotton-raw-35', 'tig-fsri-cotton-raw-75'], source: fsri,
      },
    ],
    criticalFlux: sourced(8, 13, remembered, 'mem-chf-cotton-fabric'),
  },
  'upholstery-foam': {
    ...unknown,
    name: 'upholstery foam, flexible polyurethane',
    absorptanceFresh: sourced(0.5, 0.5, espr, 'espr-alpha-polyurethane-foam-board'),
    absorptanceCharred: char,
    conductivityWmk: 0.044, densityKgm3: 34.3, heatCapacityJkgk: 1820,
    thermalSource: thermal(fsri, 'fsri-k-rebond-foam-carpet-pad', 'fsri-rho-overstuffed-chair-polyurethane-foam', 'fsri-c-rebond-foam-carpet-pad'),
    chars: true,
    smoulder: { ...sourced(7, 13, hadden, 'hadden-puf-smoulder'), sampleSizeMm: 50 },
    ignition: [
      {
        product: 'chair polyurethane foam', points: [[25, 8.4], [50, 4.4], [75, 3.7]],
        rowIds: ['tig-fsri-overstuffed-chair-polyurethane-foam-25', 'tig-fsri-overstuffed-chair-polyurethane-foam-50', 'tig-fsri-overstuffed-chair-polyurethane-foam-75'],
        source: fsri,
      },
    ],
    criticalFlux: sourced(30, 45, hadden, 'hadden-puf-flame'),
  },
  'wool-felt': {
    ...unknown,
    name: 'wool felt or wool cloth',
    absorptanceFresh: sourced(0.6, 0.9, espr, 'espr-alpha-wilton-wool-carpet', 'espr-alpha-wilton-wool-carpet-blue'),
    absorptanceCharred: char,
    conductivityWmk: 0.058, densityKgm3: 226, heatCapacityJkgk: 1330,
    thermalSource: thermal(fsri, 'fsri-k-wool-rug', 'fsri-rho-wool-rug', 'fsri-c-wool-rug'),
    chars: true,
    ignition: [
      {
        product: 'wool rug', points: [[25, 36.6], [50, 8.3], [75, 4.3]],
        rowIds: ['tig-fsri-wool-rug-25', 'tig-fsri-wool-rug-50', 'tig-fsri-wool-rug-75'], source: fsri,
      },
      {
        product: 'wool and mixed fabric', points: [[25, 38.2], [35, 23.9], [50, 17.4], [75, 7.6]],
        rowIds: ['tig-woolfabric-mixed-fabric-00mm-25', 'tig-woolfabric-mixed-fabric-00mm-75'], source: rise,
      },
    ],
    criticalFlux: sourced(20, 23, lift, 'lift-chf-carpet-wool-untreated', 'lift-chf-carpet-wool-stock'),
  },
} satisfies Record<string, TargetMaterial>;

const celluloseAndGround = {
  'paper-or-board': {
    ...unknown,
    name: 'paper or board',
    absorptanceFresh: sourced(0.25, 0.5, remembered, 'mem-white-paper-solar-absorptance', 'mem-newsprint-solar-absorptance'),
    absorptanceCharred: char,
    conductivityWmk: 0.072, densityKgm3: 480, heatCapacityJkgk: 1380,
    thermalSource: thermal(espr, 'espr-kpc-laminated-building-paper'),
    thicknessM: 0.0002,
    chars: true,
    ignition: [
      {
        product: 'corrugated cardboard 3.9 mm', points: [[25, 30.5], [50, 7.25]],
        rowIds: ['raw-tig-corrugated-cardboard-3-9-mm-25', 'raw-tig-corrugated-cardboard-3-9-mm-50'], source: fsri,
      },
    ],
    criticalFlux: sourced(10, 10, remembered, 'mem-chf-corrugated-paper', 'mem-chf-newspaper'),
  },
  timber: {
    ...unknown,
    name: 'timber',
    absorptanceFresh: sourced(0.3, 0.65, macfp, 'wood-alpha-bound', 'espr-alpha-softwood-generic'),
    absorptanceCharred: char,
    conductivityWmk: 0.1, densityKgm3: 379, heatCapacityJkgk: 1469,
    thermalSource: thermal(fsri, 'fsri-k-wood-stud', 'fsri-rho-wood-stud', 'fsri-c-wood-stud'),
    chars: true,
    smoulder: {
      low: 7.5, high: 7.5, rowIds: ['plywood-smoulder-min'], sampleSizeMm: 100,
      source: { text: 'Self-heating in smouldering ignition of plywood, Fire Safety Journal, 2006 (exposures up to 8 h)', verified: true },
    },
    ignition: [
      {
        product: 'pine, 25 mm', points: [[25, 77.4], [30, 45], [50, 20.2], [60, 13], [75, 4.9]],
        rowIds: ['macfp-wood-tig-fsri-25-para', 'macfp-wood-tig-aalto-30-para', 'macfp-wood-tig-fsri-50-para', 'macfp-wood-tig-aalto-60-para', 'macfp-wood-tig-fsri-75-para'],
        source: macfp,
      },
      {
        product: 'red oak 20 mm', points: [[20, 827.5], [35, 100.5], [50, 52], [65, 28.5]],
        rowIds: ['tig-fpl-lumber-redoak-20mm-20', 'tig-fpl-lumber-redoak-20mm-35', 'tig-fpl-lumber-redoak-20mm-50', 'tig-fpl-lumber-redoak-20mm-65'],
        source: fpl,
      },
      {
        product: 'wood stud', points: [[25, 140.4], [50, 28.9], [75, 15.9]],
        rowIds: ['tig-fsri-wood-stud-25', 'tig-fsri-wood-stud-50', 'tig-fsri-wood-stud-75'], source: fsri,
      },
    ],
    criticalFlux: sourced(10, 18, lift, 'lift-chf-hardboard-6-35-mm', 'lift-chf-plywood-plain-12-7-mm', 'lift-chf-particleboard-12-7-mm'),
  },
  'mulch-or-dry-grass': {
    ...unknown,
    name: 'mulch or dry grass',
    absorptanceFresh: sourced(0.5, 0.5, espr, 'espr-alpha-straw-thatch'),
    absorptanceCharred: char,
    conductivityWmk: 0.07, densityKgm3: 240, heatCapacityJkgk: null,
    thermalSource: thermal(espr, 'espr-kpc-straw-thatch'),
    chars: true,
  },
} satisfies Record<string, TargetMaterial>;

const roofAndWall = {
  'single-ply-membrane': {
    ...unknown,
    name: 'single-ply roof membrane, EPDM or PVC',
    absorptanceFresh: sourced(0.82, 0.92, espr, 'espr-alpha-epdm-rubber', 'espr-alpha-epdm-membrane'),
    conductivityWmk: 0.144, densityKgm3: 1200, heatCapacityJkgk: 1459,
    thermalSource: thermal(fsri, 'fsri-k-epdm-membrane', 'fsri-rho-epdm-membrane', 'fsri-c-epdm-membrane'),
    softeningC: sourced(71, 74, { text: 'taken from PVC siding for a PVC membrane; a rubber membrane does not soften', verified: false }, 'vsi-hdt'),
    ignition: [
      {
        product: 'EPDM membrane', points: [[25, 166.6], [35, 166.2], [50, 48.1], [75, 24.4]],
        rowIds: ['tig-fsri-epdm-membrane-25', 'tig-fsri-epdm-membrane-35', 'tig-fsri-epdm-membrane-50', 'tig-fsri-epdm-membrane-75'], source: fsri,
      },
    ],
    criticalFlux: sourced(13, 20, remembered, 'mem-chf-epdm-membrane'),
  },
  'bitumen-sheet': {
    ...unknown,
    name: 'bitumen sheet or roof felt',
    absorptanceFresh: sourced(0.9, 0.95, espr, 'espr-alpha-bitumen-felt', 'espr-alpha-asphalt-shingles'),
    conductivityWmk: 0.058, densityKgm3: 726, heatCapacityJkgk: 1743,
    thermalSource: thermal(fsri, 'fsri-k-roof-felt', 'fsri-rho-roof-felt', 'fsri-c-roof-felt'),
    softeningC: sourced(85, 110, remembered, 'mem-bitumen-flow'),
    ignition: [
      {
        product: 'roof felt', points: [[25, 35.9], [50, 11.4], [75, 6.1]],
        rowIds: ['tig-fsri-roof-felt-25', 'tig-fsri-roof-felt-50', 'tig-fsri-roof-felt-75'], source: fsri,
      },
      {
        product: 'asphalt shingle', points: [[25, 92.5], [50, 31.4], [75, 18]],
        rowIds: ['tig-fsri-asphalt-shingle-25', 'tig-fsri-asphalt-shingle-50', 'tig-fsri-asphalt-shingle-75'], source: fsri,
      },
    ],
    criticalFlux: sourced(10, 15, remembered, 'mem-chf-bitumen-felt'),
  },
  'vinyl-siding': {
    ...unknown,
    name: 'vinyl siding, PVC',
    absorptanceFresh: sourced(0.3, 0.8, espr, 'espr-alpha-pvc-tile', 'espr-alpha-pvc-pipe-grey'),
    conductivityWmk: 0.098, densityKgm3: 1377, heatCapacityJkgk: 1096,
    thermalSource: thermal(fsri, 'fsri-k-vinyl-siding', 'fsri-rho-vinyl-siding', 'fsri-c-vinyl-siding'),
    thicknessM: 0.00103,
    softeningC: sourced(71, 74, siding, 'vsi-hdt', 'pvc-hdt'),
    ignition: [
      {
        product: 'vinyl siding', points: [[25, 194.1], [50, 32.1], [75, 15.5]],
        rowIds: ['tig-fsri-vinyl-siding-25', 'tig-fsri-vinyl-siding-50', 'tig-fsri-vinyl-siding-75'], source: fsri,
      },
      {
        product: 'vinyl siding 1.0 mm', points: [[25, 148.5], [50, 35.5]],
        rowIds: ['raw-tig-vinyl-siding-1-0-mm-25', 'raw-tig-vinyl-siding-1-0-mm-50'], source: fsri,
      },
    ],
    criticalFlux: sourced(15, 15, remembered, 'mem-chf-rigid-pvc'),
  },
  'painted-metal': {
    ...unknown,
    name: 'painted metal',
    absorptanceFresh: sourced(0.3, 0.72, espr, 'espr-alpha-white-painted-steel', 'espr-alpha-grey-coated-aluminium'),
    conductivityWmk: 40, densityKgm3: 7800, heatCapacityJkgk: 502,
    thermalSource: thermal(espr, 'espr-kpc-white-painted-steel'),
    thicknessM: 0.0008,
  },
} satisfies Record<string, TargetMaterial>;

const plastics = {
  'artificial-turf': {
    ...unknown,
    name: 'artificial turf, polyolefin',
    absorptanceFresh: sourced(0.65, 0.65, espr, 'espr-alpha-synthetic-carpet'),
    conductivityWmk: 0.06, densityKgm3: 214, heatCapacityJkgk: 1349,
    thermalSource: thermal(fsri, 'fsri-k-polyolefin-carpet-low-pile', 'fsri-rho-polyolefin-carpet-low-pile', 'fsri-c-polyolefin-carpet-low-pile'),
    softeningC: sourced(135, 170, polymer, 'pslc-melt-polyethylene', 'pslc-melt-polypropylene'),
    ignition: [
      {
        product: 'polyolefin carpet, low pile', points: [[25, 44.7], [50, 14.5], [75, 7.9]],
        rowIds: ['tig-fsri-polyolefin-carpet-low-pile-25', 'tig-fsri-polyolefin-carpet-low-pile-50', 'tig-fsri-polyolefin-carpet-low-pile-75'], source: fsri,
      },
    ],
    criticalFlux: sourced(10, 18, lift, 'lift-chf-carpet-acrylic', 'lift-chf-carpet-nylon-wool-blend'),
  },
  acrylic: {
    ...unknown,
    name: 'acrylic sheet, PMMA',
    absorptanceFresh: null,
    conductivityWmk: 0.155, densityKgm3: 1182, heatCapacityJkgk: 1478,
    thermalSource: thermal(fsri, 'fsri-k-black-pmma', 'fsri-rho-black-pmma', 'fsri-c-black-pmma'),
    softeningC: sourced(95, 105, remembered, 'mem-pmma-softening'),
    ignition: [
      { product: 'PMMA', points: [[25, 106.2], [50, 37.2], [75, 22]], rowIds: ['tig-fsri-pmma-25', 'tig-fsri-pmma-50', 'tig-fsri-pmma-75'], source: fsri },
    ],
    criticalFlux: sourced(9, 15, lift, 'lift-chf-pmma-polycast-1-6-mm', 'lift-chf-pmma-type-g-12-7-mm'),
    absorbsInDepth: true,
  },
  'other-plastic': {
    ...unknown,
    name: 'other plastic, taken as dark polypropylene or ABS',
    absorptanceFresh: sourced(0.6, 0.9, espr, 'espr-alpha-abs-case-light', 'espr-alpha-abs-case-dark-grey'),
    conductivityWmk: 0.151, densityKgm3: 887, heatCapacityJkgk: 1920,
    thermalSource: thermal(fsri, 'fsri-k-pp', 'fsri-rho-pp', 'fsri-c-pp'),
    softeningC: sourced(85, 100, { text: 'filament-db wiki, makers’ data sheets, heat deflection of polypropylene and ABS', verified: true }, 'fdm-hdt-pvc-neighbours'),
    ignition: [
      { product: 'polypropylene', points: [[25, 131.2], [50, 47.9], [75, 28]], rowIds: ['tig-fsri-pp-25', 'tig-fsri-pp-50', 'tig-fsri-pp-75'], source: fsri },
    ],
    criticalFlux: sourced(15, 15, remembered, 'mem-chf-polypropylene'),
  },
  'vehicle-trim': {
    ...unknown,
    name: 'vehicle trim, dark polyester cloth or polypropylene',
    absorptanceFresh: sourced(0.65, 0.9, espr, 'espr-alpha-synthetic-carpet', 'espr-alpha-abs-case-dark-grey'),
    conductivityWmk: 0.06, densityKgm3: 188, heatCapacityJkgk: 1528,
    thermalSource: thermal(fsri, 'fsri-k-nylon-carpet-high-pile', 'fsri-rho-nylon-carpet-high-pile', 'fsri-c-nylon-carpet-high-pile'),
    softeningC: sourced(85, 100, { text: 'filament-db wiki, makers’ data sheets, heat deflection of polypropylene and ABS', verified: true }, 'fdm-hdt-pvc-neighbours'),
    ignition: [
      { product: 'polyester 2 mm', points: [[35, 67.2], [50, 33.9], [75, 26.7]], rowIds: ['tig-polyester-02mm-35', 'tig-polyester-02mm-50', 'tig-polyester-02mm-75'], source: rise },
    ],
  },
  tarpaulin: {
    ...unknown,
    name: 'tarpaulin, polyethylene',
    absorptanceFresh: sourced(0.8, 0.8, espr, 'espr-alpha-hdpe-pipe'),
    conductivityWmk: 0.217, densityKgm3: 927, heatCapacityJkgk: 2600,
    thermalSource: thermal(fsri, 'fsri-k-ldpe', 'fsri-rho-ldpe', 'fsri-c-ldpe'),
    thicknessM: 0.0003,
    softeningC: sourced(135, 135, polymer, 'pslc-melt-polyethylene'),
    ignition: [
      { product: 'LDPE', points: [[25, 137], [50, 59.1], [75, 37.4]], rowIds: ['tig-fsri-ldpe-25', 'tig-fsri-ldpe-50', 'tig-fsri-ldpe-75'], source: fsri },
    ],
    criticalFlux: sourced(15, 15, remembered, 'mem-chf-polyethylene'),
  },
  skin: {
    ...unknown,
    name: 'bare skin',
    absorptanceFresh: null,
    burnsSkin: true,
  },
} satisfies Record<string, TargetMaterial>;

const all = { ...textiles, ...celluloseAndGround, ...roofAndWall, ...plastics };

/** Target materials by id; the ids are those of the scene's list. */
export const targetMaterials: ReadonlyMap<string, TargetMaterial> = new Map<string, TargetMaterial>(Object.entries(all));
