/**
 * Spectra behind broadband absorption and colour: beam, refractive indices, extinction, one metal.
 *
 * Tables are pairs in ascending wavelength [µm]. `rows` names the rows of the reference collection that hold values
 * of the same data set, so that a reader can compare.
 */

export interface SpectralSource {
  readonly author: string;
  readonly year: string;
  readonly title: string;
  readonly locator: string;
  readonly rows: readonly string[];
  /** False: from memory or beyond the measured range; say so wherever it is shown. */
  readonly verified: boolean;
}

/** Alternating wavelength [µm] and value. */
export type Pairs = readonly number[];

/** Direct normal irradiance of the reference spectrum. [µm, W/(m²·nm)] */
export const directBeam: { readonly source: SpectralSource; readonly pairs: Pairs } = {
  source: {
    author: 'ASTM International',
    year: '2003',
    title: 'G173-03, reference solar spectral irradiance, air mass 1.5 (SMARTS 2.9.2)',
    locator: 'direct normal and circumsolar column: means over 5 nm to 1.35 µm, points every 10 nm to 1.7, 20 nm to 2.5, means over 50 nm to 3.5, points every 100 nm beyond',
    rows: ['spec-01', 'spec-03'],
    verified: true,
  },
  pairs: [
    0.28, 0, 0.295, 0.0000032246, 0.3, 0.00091573, 0.305, 0.0092093, 0.31, 0.033896, 0.315, 0.072016,
    0.32, 0.11307, 0.325, 0.16857, 0.33, 0.23409, 0.335, 0.24424, 0.34, 0.27446, 0.345, 0.28575, 0.35, 0.31945,
    0.355, 0.34651, 0.36, 0.34437, 0.365, 0.43138, 0.37, 0.47394, 0.375, 0.45653, 0.38, 0.49318, 0.385, 0.43641,
    0.39, 0.52231, 0.395, 0.50551, 0.4, 0.77792, 0.405, 0.88103, 0.41, 0.89401, 0.415, 0.94968, 0.42, 0.9547,
    0.425, 0.96595, 0.43, 0.85323, 0.435, 1.0079, 0.44, 1.0812, 0.445, 1.1712, 0.45, 1.26, 0.455, 1.2781,
    0.46, 1.3076, 0.465, 1.3094, 0.47, 1.3087, 0.475, 1.3454, 0.48, 1.3723, 0.485, 1.2939, 0.49, 1.3119,
    0.495, 1.3634, 0.5, 1.3315, 0.505, 1.344, 0.51, 1.3628, 0.515, 1.3012, 0.52, 1.296, 0.525, 1.342, 0.53, 1.362,
    0.535, 1.3639, 0.54, 1.3385, 0.545, 1.3615, 0.55, 1.3656, 0.555, 1.3655, 0.56, 1.3376, 0.565, 1.3433,
    0.57, 1.33, 0.575, 1.3321, 0.58, 1.3447, 0.585, 1.3592, 0.59, 1.2781, 0.595, 1.3083, 0.6, 1.3175,
    0.605, 1.3329, 0.61, 1.3267, 0.615, 1.3058, 0.62, 1.3126, 0.625, 1.2758, 0.63, 1.2679, 0.635, 1.297,
    0.64, 1.3081, 0.645, 1.2936, 0.65, 1.261, 0.655, 1.2144, 0.66, 1.2409, 0.665, 1.2744, 0.67, 1.283,
    0.675, 1.2713, 0.68, 1.264, 0.685, 1.1735, 0.69, 1.075, 0.695, 1.1587, 0.7, 1.1689, 0.705, 1.1819,
    0.71, 1.1882, 0.715, 1.1155, 0.72, 0.96983, 0.725, 0.98926, 0.73, 1.0061, 0.735, 1.0968, 0.74, 1.1085,
    0.745, 1.1339, 0.75, 1.1284, 0.755, 1.1244, 0.76, 0.64069, 0.765, 0.65614, 0.77, 1.0335, 0.775, 1.0793,
    0.78, 1.072, 0.785, 1.0605, 0.79, 1.0227, 0.795, 1.0057, 0.8, 0.99998, 0.805, 0.99267, 0.81, 0.96874,
    0.815, 0.83927, 0.82, 0.81764, 0.825, 0.84598, 0.83, 0.85203, 0.835, 0.89898, 0.84, 0.93046, 0.845, 0.92957,
    0.85, 0.88975, 0.855, 0.877, 0.86, 0.91936, 0.865, 0.88148, 0.87, 0.88356, 0.875, 0.88079, 0.88, 0.87062,
    0.885, 0.86237, 0.89, 0.85267, 0.895, 0.74201, 0.9, 0.6281, 0.905, 0.69174, 0.91, 0.6209, 0.915, 0.60914,
    0.92, 0.67132, 0.925, 0.66549, 0.93, 0.43589, 0.935, 0.2086, 0.94, 0.32396, 0.945, 0.29957, 0.95, 0.31413,
    0.955, 0.33506, 0.96, 0.39579, 0.965, 0.47941, 0.97, 0.60512, 0.975, 0.5734, 0.98, 0.61252, 0.985, 0.67441,
    0.99, 0.69886, 0.995, 0.70226, 1.0, 0.69334, 1.005, 0.67413, 1.01, 0.67869, 1.015, 0.67073, 1.02, 0.65815,
    1.025, 0.65417, 1.03, 0.64882, 1.035, 0.64114, 1.04, 0.63445, 1.045, 0.6248, 1.05, 0.61847, 1.055, 0.61005,
    1.06, 0.59575, 1.065, 0.58907, 1.07, 0.57586, 1.075, 0.57472, 1.08, 0.56414, 1.085, 0.54978, 1.09, 0.53881,
    1.095, 0.50451, 1.1, 0.47155, 1.105, 0.43771, 1.11, 0.38266, 1.115, 0.22903, 1.12, 0.13488, 1.125, 0.10987,
    1.13, 0.1404, 1.135, 0.13574, 1.14, 0.22819, 1.145, 0.16561, 1.15, 0.18157, 1.155, 0.25133, 1.16, 0.3209,
    1.165, 0.38139, 1.17, 0.41378, 1.175, 0.41454, 1.18, 0.40944, 1.185, 0.40079, 1.19, 0.41822, 1.195, 0.4298,
    1.2, 0.40785, 1.205, 0.41025, 1.21, 0.41627, 1.215, 0.42585, 1.22, 0.43466, 1.225, 0.43449, 1.23, 0.44183,
    1.235, 0.44454, 1.24, 0.44168, 1.245, 0.43763, 1.25, 0.43493, 1.255, 0.42489, 1.26, 0.40236, 1.265, 0.3661,
    1.27, 0.35515, 1.275, 0.3957, 1.28, 0.3964, 1.285, 0.39846, 1.29, 0.39529, 1.295, 0.3814, 1.3, 0.35746,
    1.305, 0.33903, 1.31, 0.31964, 1.315, 0.29535, 1.32, 0.27454, 1.325, 0.26253, 1.33, 0.19112, 1.335, 0.17867,
    1.34, 0.15959, 1.345, 0.084671, 1.35, 0.01395,
    1.36, 0.0000020706, 1.4, 3.1513e-9, 1.41, 0.00045332,
    1.42, 0.0080437, 1.43, 0.059912, 1.44, 0.038547, 1.45, 0.026699, 1.46, 0.083161, 1.47, 0.048397, 1.48, 0.059063,
    1.49, 0.16993, 1.5, 0.24339, 1.51, 0.26269, 1.52, 0.25688, 1.53, 0.24789, 1.54, 0.25737, 1.55, 0.26226,
    1.56, 0.25821, 1.57, 0.23497, 1.58, 0.23772, 1.59, 0.23486, 1.6, 0.23133, 1.61, 0.21146, 1.62, 0.22783,
    1.63, 0.22984, 1.64, 0.20913, 1.65, 0.21902, 1.66, 0.21721, 1.67, 0.21573, 1.68, 0.20017, 1.69, 0.19991,
    1.7, 0.19464, 1.72, 0.18231, 1.74, 0.16405, 1.76, 0.15608, 1.78, 0.098143, 1.8, 0.031112, 1.82, 0.00096578,
    1.84, 6.1337e-8, 1.86, 0.00001092, 1.88, 0.000076123, 1.9, 8.4916e-7, 1.92, 0.00044451, 1.94, 0.0032357,
    1.96, 0.021569, 1.98, 0.074234, 2, 0.037491, 2.02, 0.044239, 2.04, 0.088344, 2.06, 0.068157, 2.08, 0.085528,
    2.1, 0.084869, 2.12, 0.086281, 2.14, 0.08939, 2.16, 0.082912, 2.18, 0.080597, 2.2, 0.070175, 2.22, 0.076631,
    2.24, 0.07214, 2.26, 0.066143, 2.28, 0.065551, 2.3, 0.058193, 2.32, 0.051489, 2.34, 0.045366, 2.36, 0.049724,
    2.38, 0.042128, 2.4, 0.043726, 2.42, 0.026358, 2.44, 0.042926, 2.46, 0.033157, 2.48, 0.0079996, 2.5, 0.0070328,
    2.55, 2.8066e-13, 2.8, 1.6665e-12, 2.85, 0.0000887, 2.9, 0.001447, 2.95, 0.003572, 3, 0.005027,
    3.05, 0.003348, 3.1, 0.003379, 3.15, 0.007307, 3.2, 0.003987, 3.25, 0.003452, 3.3, 0.003927, 3.35, 0.005288,
    3.4, 0.008489, 3.45, 0.01051, 3.5, 0.01155, 3.55, 0.010616, 3.6, 0.010328, 3.7, 0.010937, 3.8, 0.0098988,
    3.9, 0.0079487, 4, 0.0071199,
  ],
};

/** Extinction coefficient of crown glass N-BK7. [µm, –] */
export const crownExtinction: { readonly source: SpectralSource; readonly pairs: Pairs } = {
  source: {
    author: 'SCHOTT',
    year: '2017',
    title: 'SCHOTT Zemax catalogue 2017-01-20b, N-BK7',
    locator: 'internal transmittance table as extinction coefficient, 0.30–2.50 µm',
    rows: ['a-n-bk7-0.55', 'a-n-bk7-0.65', 'a-n-bk7-0.88', 'ab-n-bk7-0.3-0.7', 'ab-n-bk7-0.7-1.1', 'ab-n-bk7-1.1-1.8', 'ab-n-bk7-1.8-2.5'],
    verified: true,
  },
  pairs: [
    0.3, 2.8607e-6, 0.31, 1.3679e-6, 0.32, 6.6608e-7, 0.334, 2.6415e-7, 0.35, 9.2894e-8, 0.365, 3.4191e-8,
    0.37, 2.7405e-8, 0.38, 2.074e-8, 0.39, 1.3731e-8, 0.4, 1.0227e-8, 0.405, 9.0558e-9, 0.42, 9.3912e-9,
    0.436, 1.1147e-8, 0.46, 1.0286e-8, 0.5, 9.5781e-9, 0.546, 6.9658e-9, 0.58, 9.2541e-9, 0.62, 1.1877e-8,
    0.66, 1.2643e-8, 0.7, 8.9305e-9, 1.06, 1.0137e-8, 1.53, 9.839e-8, 1.97, 1.0933e-6, 2.325, 4.2911e-6, 2.5, 8.13e-6,
  ],
};

/** Extinction coefficient of liquid water at 25 °C. [µm, –] */
export const waterExtinction: { readonly source: SpectralSource; readonly pairs: Pairs } = {
  source: {
    author: 'Hale, G. M.; Querry, M. R.',
    year: '1973',
    title: 'Optical constants of water in the 200-nm to 200-µm wavelength region, Appl. Opt. 12:555',
    locator: 'table, k column, 0.275–4.0 µm; doi:10.1364/AO.12.000555',
    rows: ['a-water-hale-querry-0.55', 'ab-water-hale-querry-0.3-0.7', 'ab-water-hale-querry-0.7-1.1', 'ab-water-hale-querry-1.1-1.8', 'ab-water-hale-querry-1.8-2.5'],
    verified: true,
  },
  pairs: [
    0.275, 2.35e-8, 0.3, 1.6e-8, 0.325, 1.08e-8, 0.35, 6.5e-9, 0.375, 3.5e-9, 0.4, 1.86e-9, 0.425, 1.3e-9,
    0.45, 1.02e-9, 0.475, 9.35e-10, 0.5, 1e-9, 0.525, 1.32e-9, 0.55, 1.96e-9, 0.575, 3.6e-9, 0.6, 1.09e-8,
    0.625, 1.39e-8, 0.65, 1.64e-8, 0.675, 2.23e-8, 0.7, 3.35e-8, 0.725, 9.15e-8, 0.75, 1.56e-7, 0.775, 1.48e-7,
    0.8, 1.25e-7, 0.825, 1.82e-7, 0.85, 2.93e-7, 0.875, 3.91e-7, 0.9, 4.86e-7, 0.925, 1.06e-6, 0.95, 2.93e-6,
    0.975, 3.48e-6, 1, 2.89e-6, 1.2, 9.89e-6, 1.4, 1.38e-4, 1.6, 8.55e-5, 1.8, 1.15e-4, 2, 1.1e-3, 2.2, 2.89e-4,
    2.4, 9.56e-4, 2.6, 3.17e-3, 2.65, 6.7e-3, 2.7, 0.019, 2.75, 0.059, 2.8, 0.115, 2.85, 0.185, 2.9, 0.268,
    2.95, 0.298, 3, 0.272, 3.05, 0.24, 3.1, 0.192, 3.15, 0.135, 3.2, 0.0924, 3.25, 0.061, 3.3, 0.0368, 3.35, 0.0261,
    3.4, 0.0195, 3.45, 0.0132, 3.5, 0.0094, 3.6, 0.00515, 3.7, 0.0036, 3.8, 0.0034, 3.9, 0.0038, 4, 0.0046,
  ],
};

/** Refractive index of water beyond the range of the visible fit. [µm, –] */
export const waterInfraredIndex: Pairs = [
  1, 1.327, 1.2, 1.324, 1.4, 1.321, 1.6, 1.317, 1.8, 1.312, 2, 1.306, 2.2, 1.296, 2.4, 1.279, 2.6, 1.242,
];

const rubin = {
  author: 'Rubin, M.',
  year: '1985',
  title: 'Optical properties of soda lime silica glasses, Sol. Energy Mater. 12:275-288',
  verified: true,
} as const;

/** Extinction coefficient of ordinary (iron-bearing) clear window glass. [µm, –] */
export const sodaLimeClearExtinction: { readonly source: SpectralSource; readonly pairs: Pairs } = {
  source: { ...rubin, locator: 'clear glass, 0.31–4.0 µm', rows: ['a-soda-lime-clear-rubin-0.55', 'a-soda-lime-clear-rubin-0.88', 'ab-soda-lime-clear-rubin-0.3-0.7'] },
  pairs: [
    0.31, 4.996e-5, 0.32, 1.375e-5, 0.33, 6.281e-6, 0.34, 2.713e-6, 0.35, 1.118e-6, 0.36, 5.419e-7, 0.37, 4.061e-7,
    0.38, 5.936e-7, 0.39, 2.828e-7, 0.4, 2.047e-7, 0.42, 2.279e-7, 0.44, 2.342e-7, 0.46, 1.669e-7, 0.48, 1.683e-7,
    0.5, 1.492e-7, 0.52, 1.582e-7, 0.54, 1.988e-7, 0.56, 2.529e-7, 0.58, 3.563e-7, 0.6, 4.548e-7, 0.62, 5.972e-7,
    0.64, 7.754e-7, 0.66, 9.108e-7, 0.68, 1.097e-6, 0.7, 1.234e-6, 0.72, 1.466e-6, 0.74, 1.706e-6, 0.76, 1.956e-6,
    0.78, 2.214e-6, 0.8, 2.477e-6, 0.82, 2.755e-6, 0.84, 3.022e-6, 0.86, 3.274e-6, 0.88, 3.51e-6, 0.9, 3.727e-6,
    0.92, 3.906e-6, 0.94, 4.083e-6, 0.96, 4.261e-6, 0.98, 4.433e-6, 1, 4.591e-6, 1.1, 5.111e-6, 1.2, 5.374e-6,
    1.3, 5.353e-6, 1.4, 4.939e-6, 1.5, 4.234e-6, 1.6, 3.675e-6, 1.7, 3.656e-6, 1.8, 3.92e-6, 1.9, 4.19e-6,
    2, 4.423e-6, 2.1, 4.476e-6, 2.2, 5.373e-6, 2.3, 5.082e-6, 2.4, 5.372e-6, 2.5, 6.324e-6, 2.6, 6.883e-6,
    2.7, 1.02e-5, 2.8, 6.495e-5, 2.9, 7.931e-5, 3, 7.432e-5, 3.1, 7.424e-5, 3.2, 8.187e-5, 3.3, 9.341e-5,
    3.4, 9.958e-5, 3.5, 1.065e-4, 3.6, 1.073e-4, 3.7, 1.049e-4, 3.8, 1.029e-4, 3.9, 1.033e-4, 4, 1.06e-4,
  ],
};

/** Extinction coefficient of low-iron window glass. [µm, –] */
export const sodaLimeLowIronExtinction: { readonly source: SpectralSource; readonly pairs: Pairs } = {
  source: { ...rubin, locator: 'low-iron glass, 0.31–4.0 µm', rows: ['a-soda-lime-low-iron-rubin-0.55', 'a-soda-lime-low-iron-rubin-0.88', 'ab-soda-lime-low-iron-rubin-0.3-0.7'] },
  pairs: [
    0.31, 1.191e-5, 0.32, 3.062e-6, 0.33, 1.399e-6, 0.34, 6.061e-7, 0.35, 2.458e-7, 0.36, 1.164e-7, 0.37, 9.3e-8,
    0.38, 1.309e-7, 0.39, 6.261e-8, 0.4, 4.57e-8, 0.42, 5.449e-8, 0.44, 5.095e-8, 0.46, 3.351e-8, 0.48, 3.995e-8,
    0.5, 3.257e-8, 0.52, 3.816e-8, 0.54, 4.362e-8, 0.56, 6.429e-8, 0.58, 8.597e-8, 0.6, 1.087e-7, 0.62, 1.325e-7,
    0.64, 1.749e-7, 0.66, 2.013e-7, 0.68, 2.476e-7, 0.7, 2.769e-7, 0.72, 3.271e-7, 0.74, 3.796e-7, 0.76, 4.344e-7,
    0.78, 4.916e-7, 0.8, 5.51e-7, 0.82, 6.128e-7, 0.84, 6.77e-7, 0.86, 7.193e-7, 0.88, 7.875e-7, 0.9, 8.328e-7,
    0.92, 8.792e-7, 0.94, 9.002e-7, 0.96, 9.484e-7, 0.98, 9.977e-7, 1, 1.02e-6, 1.1, 1.132e-6, 1.2, 1.21e-6,
    1.3, 1.211e-6, 1.4, 1.118e-6, 1.5, 9.585e-7, 1.6, 8.129e-7, 1.7, 8.301e-7, 1.8, 9.432e-7, 1.9, 1.117e-6,
    2, 1.471e-6, 2.1, 1.739e-6, 2.2, 2.027e-6, 2.3, 2.401e-6, 2.4, 2.868e-6, 2.5, 3.441e-6, 2.6, 5.643e-6,
    2.7, 9.156e-6, 2.8, 8.56e-5, 2.9, 9.745e-5, 3, 9.318e-5, 3.1, 9.489e-5, 3.2, 1.025e-4, 3.3, 1.128e-4,
    3.4, 1.25e-4, 3.5, 1.299e-4, 3.6, 1.333e-4, 3.7, 1.319e-4, 3.8, 1.282e-4, 3.9, 1.242e-4, 4, 1.267e-4,
  ],
};

/** Band coefficients for materials without a usable extinction table; bands 0.3/0.7/1.1/1.8/2.5 µm. [1/m] */
export interface BandAbsorption {
  readonly source: SpectralSource;
  readonly perM: readonly [number, number, number, number];
}

const zhang = {
  author: 'Zhang, X. et al.',
  year: '2020',
  title: 'Complex refractive indices of polymers, Appl. Opt. 59:2337',
  verified: true,
} as const;

/** Acrylic. Scatter in the sample limits the first band, so absorption is an upper bound. */
export const acrylicBands: BandAbsorption = {
  source: {
    ...zhang,
    locator: 'band 1: mean of 0.55 and 0.65 µm; bands 2–4: effective coefficients for a 10 mm path',
    rows: ['a-pmma-zhang-mitsubishi-0.55', 'a-pmma-zhang-mitsubishi-0.65', 'ab-pmma-zhang-mitsubishi-0.7-1.1', 'ab-pmma-zhang-mitsubishi-1.1-1.8', 'ab-pmma-zhang-mitsubishi-1.8-2.5'],
  },
  perM: [3.5155, 3.87, 48.94, 267.7],
};

/** Polycarbonate. Scatter in the sample limits the first band, so absorption is an upper bound. */
export const polycarbonateBands: BandAbsorption = {
  source: {
    ...zhang,
    locator: 'band 1: mean of 0.55 and 0.65 µm; bands 2–4: effective coefficients for a 10 mm path',
    rows: ['a-pc-zhang-0.55', 'a-pc-zhang-0.65', 'ab-pc-zhang-0.7-1.1', 'ab-pc-zhang-1.1-1.8', 'ab-pc-zhang-1.8-2.5'],
  },
  perM: [6.9425, 3.02, 37.65, 255.03],
};

/** Complex index of evaporated aluminium: wavelength, n, k. [µm, –, –] */
export const aluminium: { readonly source: SpectralSource; readonly triples: readonly number[] } = {
  source: {
    author: 'Rakić, A. D.',
    year: '1995',
    title: 'Algorithm for the determination of intrinsic optical constants of metal films: application to aluminum, Appl. Opt. 34:4755',
    locator: 'table, 0.25–4.1 µm; doi:10.1364/AO.34.004755',
    rows: ['r-al-rakic'],
    verified: true,
  },
  triples: [
    0.24797, 0.18137, 2.9029, 0.30996, 0.28003, 3.7081, 0.36466, 0.39877, 4.3957, 0.41328, 0.52135, 5.0008,
    0.4428, 0.6079, 5.3676, 0.47687, 0.7278, 5.7781, 0.5166, 0.8734, 6.2418, 0.56357, 1.0728, 6.7839,
    0.61993, 1.366, 7.4052, 0.65225, 1.5724, 7.7354, 0.68881, 1.8301, 8.0601, 0.72932, 2.1606, 8.3565,
    0.77491, 2.6154, 8.4914, 0.79478, 2.7675, 8.3866, 0.81569, 2.7668, 8.2573, 0.83774, 2.6945, 8.1878,
    0.88561, 2.2802, 8.1134, 0.91166, 1.9739, 8.3058, 0.93928, 1.6784, 8.597, 0.96863, 1.4867, 9.0655,
    0.99988, 1.4359, 9.4939, 1.0332, 1.3998, 9.8914, 1.1271, 1.3281, 10.969, 1.2399, 1.3157, 12.245,
    1.3776, 1.3899, 13.784, 1.5498, 1.5782, 15.656, 1.7712, 1.9205, 17.991, 2.0664, 2.4738, 20.982,
    2.4797, 3.3372, 25.004, 3.0996, 4.7097, 30.737, 3.6466, 5.9564, 35.608, 4.1328, 7.0796, 39.826,
  ],
};

/** Dispersion of the named materials, as published fits. Wavelength λ in µm. */
export interface Dispersion {
  readonly source: SpectralSource;
  /** Sellmeier terms (B, C in n² = 1 + Σ B λ²/(λ² − C)), or Cauchy coefficients a + bλ² + c/λ². */
  readonly form: 'sellmeier' | 'cauchy';
  readonly coefficients: readonly number[];
  readonly longestUm: number;
}

export const dispersions = {
  'crown-glass': {
    source: { author: 'SCHOTT', year: '2017', title: 'SCHOTT Zemax catalogue 2017-01-20b, N-BK7', locator: 'Sellmeier coefficients', rows: ['n-n-bk7-0.55', 'n-n-bk7-0.5893', 'n-n-bk7-0.65', 'n-n-bk7-0.88'], verified: true },
    form: 'sellmeier',
    coefficients: [1.03961212, 0.00600069867, 0.231792344, 0.0200179144, 1.01046945, 103.560653],
    longestUm: 2.5,
  },
  'soda-lime': {
    source: { ...rubin, locator: 'fit n = 1.5130 − 0.003169 λ² + 0.003962 λ⁻²', rows: ['n-soda-lime-clear-rubin-0.5893', 'n-soda-lime-clear-rubin-0.88'] },
    form: 'cauchy',
    coefficients: [1.513, -0.003169, 0.003962],
    longestUm: 4.6,
  },
  water: {
    source: { author: 'Daimon, M.; Masumura, A.', year: '2007', title: 'Measurement of the refractive index of distilled water, Appl. Opt. 46:3811', locator: '20.0 °C, four-term fit; doi:10.1364/AO.46.003811', rows: ['n-water-daimon-20c-0.55', 'n-water-daimon-20c-0.5893', 'n-water-daimon-20c-0.88'], verified: true },
    form: 'sellmeier',
    coefficients: [0.5684027565, 0.005101829712, 0.1726177391, 0.01821153936, 0.02086189578, 0.02620722293, 0.1130748688, 10.69792721],
    longestUm: 1.129,
  },
  acrylic: {
    source: { author: 'Sultanova, N.; Kasarova, S.; Nikolov, I.', year: '2009', title: 'Dispersion properties of optical polymers, Acta Phys. Pol. A 116:585', locator: 'one-term fit, 0.44–1.05 µm', rows: ['n-pmma-sultanova-0.55', 'n-pmma-sultanova-0.5893', 'n-pmma-sultanova-0.88'], verified: true },
    form: 'sellmeier',
    coefficients: [1.1819, 0.011313],
    longestUm: 1.05,
  },
  polycarbonate: {
    source: { author: 'Sultanova, N.; Kasarova, S.; Nikolov, I.', year: '2009', title: 'Dispersion properties of optical polymers, Acta Phys. Pol. A 116:585', locator: 'one-term fit, 0.44–1.05 µm', rows: ['n-pc-sultanova-0.55', 'n-pc-sultanova-0.5893', 'n-pc-sultanova-0.88'], verified: true },
    form: 'sellmeier',
    coefficients: [1.4182, 0.021304],
    longestUm: 1.05,
  },
} as const satisfies Record<string, Dispersion>;
