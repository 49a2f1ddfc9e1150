/** Start of the names of the stores in which a device keeps pages of cases that somebody took along, one a page. */
export const takenPrefix = 'taken-along ';

const pages = /^\/cases\/\d+\/measurements$/u;

/** Whether the page at this path can be taken along to a place without a signal. */
export const travelsAlong = (pathname: string): boolean => pages.test(pathname);

/** Paths of the pages that this device keeps, in the order of their names. */
export async function listTaken(): Promise<string[]> {
  if (!('caches' in globalThis)) return [];
  return (await caches.keys()).filter((name) => name.startsWith(takenPrefix)).map((name) => name.slice(takenPrefix.length)).sort();
}

/** Removes every page of a case from this device. */
export async function forgetTaken(): Promise<void> {
  for (const path of await listTaken()) await caches.delete(`${takenPrefix}${path}`);
}
