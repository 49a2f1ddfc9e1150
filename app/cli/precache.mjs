/** What the report page needs of a build: read from the framework's manifest and followed through the scripts. */
import { createHash } from 'node:crypto';
import { readdirSync, readFileSync } from 'node:fs';
import { dirname, join, posix } from 'node:path';

/** Routes that open without a connection. */
const routes = ['root', 'routes/public/report', 'routes/public/report-received'];
/** Files of `public/` that belong to the installed page. */
const fixedFiles = ['/favicon.svg', '/manifest.webmanifest', '/icon-192.png', '/icon-512.png'];

/**
 * @param {string} clientFolder `build/client`
 * @returns {{ files: string[], hash: string }} addresses from `/`, and a hash over their contents
 */
export function filesForReporting(clientFolder) {
  const manifestFile = readdirSync(join(clientFolder, 'assets')).find((name) => /^manifest-.*\.js$/u.test(name));
  if (!manifestFile) throw new Error('The build has no route manifest.');
  const text = readFileSync(join(clientFolder, 'assets', manifestFile), 'utf8');
  const manifest = JSON.parse(text.slice(text.indexOf('{'), text.lastIndexOf('}') + 1));
  const parts = [manifest.entry, ...routes.map((id) => manifest.routes[id])];
  const found = new Set([`/assets/${manifestFile}`, ...fixedFiles]);
  const open = parts.flatMap((part) => [part.module, ...(part.imports ?? []), ...(part.css ?? [])]);
  for (let address = open.pop(); address; address = open.pop()) {
    if (found.has(address)) continue;
    found.add(address);
    open.push(...namedIn(readFileSync(join(clientFolder, address), 'utf8'), address));
  }
  const files = [...found].sort();
  const hash = createHash('sha256');
  for (const address of files) hash.update(address).update(readFileSync(join(clientFolder, address)));
  return { files, hash: hash.digest('hex').slice(0, 12) };
}

/** Scripts that a script imports, at once or later, and files that styles and scripts name. */
function namedIn(text, address) {
  const relative = [...text.matchAll(/["'`](\.\/[\w.-]+\.(?:js|css))["'`]/gu)].map((match) => posix.join(dirname(address), match[1]));
  const absolute = [...text.matchAll(/\/?assets\/[\w.-]+\.(?:js|css|woff2|png|svg|json)/gu)].map((match) => `/${match[0].replace(/^\//u, '')}`);
  return [...relative, ...absolute].filter((found) => !/\.woff$/u.test(found));
}
