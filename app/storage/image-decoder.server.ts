import sharp from 'sharp';

/**
 * The one door to the picture decoder. Decoders are where hostile files do harm, so only three of them are left open;
 * the rest (vector drawings, PDF, TIFF, and those that call other programs) are switched off for this process.
 */
sharp.block({ operation: ['VipsForeignLoad'] });
sharp.unblock({ operation: ['VipsForeignLoadJpeg', 'VipsForeignLoadPng', 'VipsForeignLoadWebp'] });
// Photos come one at a time; kept decodings would only hold memory.
sharp.cache(false);

export { sharp as imageDecoder };
