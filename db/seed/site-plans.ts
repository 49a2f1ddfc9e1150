import { readFile } from 'node:fs/promises';
import { demoSitePlans } from '#fixtures/demo/site-plans.ts';
import { putObject } from '#app/storage/objects.server.ts';
import { examinePhoto } from '#app/storage/photo-intake.server.ts';
import { planPicture } from '#app/storage/plan-picture.server.ts';
import type { Transaction } from '#db/client.server.ts';
import { sitePlans } from '#db/schema/all.ts';
import { pick } from './people-and-sites.ts';
import type { DemoPlaces } from './people-and-sites.ts';

/** Drawings of the demonstration's sites, through the same intake as those that are uploaded. */
export async function seedSitePlans(tx: Transaction, places: DemoPlaces): Promise<void> {
  for (const { siteCode, name, fileName, points } of demoSitePlans) {
    const bytes = new Uint8Array(await readFile(new URL(`../../fixtures/demo/${fileName}`, import.meta.url)));
    const examined = await examinePhoto({ name: fileName, bytes });
    if (!examined.ok) throw new Error(examined.sentence);
    const { sha256, mime } = examined.photo;
    const copy = await planPicture(bytes);
    const keys = { originalKey: `plans/${sha256}/original`, pictureKey: `plans/${sha256}/picture.png` };
    await putObject(keys.originalKey, bytes, mime);
    await putObject(keys.pictureKey, copy.bytes, 'image/png');
    await tx.insert(sitePlans).values({ siteId: pick(places.sites, siteCode).id, name, sha256, ...keys, widthPx: copy.widthPx, heightPx: copy.heightPx, points, createdById: pick(places.userIds, 'joss') });
  }
}
