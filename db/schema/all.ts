/** Every table in one namespace, for the typed client and for `drizzle-kit`. */
export * from './people.ts';
export * from './sites.ts';
export * from './cases.ts';
export * from './involvements.ts';
export * from './photos.ts';
export * from './reconstructions.ts';
export * from './findings.ts';
export * from './corrective-actions.ts';
export * from './releases.ts';
export * from './log.ts';
