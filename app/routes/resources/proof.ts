import type { Route } from './+types/proof';
import { db, inTransaction } from '#db/client.server.ts';
import { getProof } from '#db/queries/corrective-actions.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import { requireActor } from '#app/auth/middleware.server.ts';
import { notFound } from '#app/domain/errors.ts';
import type { Actor } from '#app/domain/roles.ts';
import { respond } from '#app/http/to-response.server.ts';
import { getObject } from '#app/storage/objects.server.ts';
import { sha256Hex } from '#app/storage/sha256.server.ts';

/** A file that proves an action, to whoever may read that action; bytes that are no longer the stored ones are refused. */
export function loader({ request, context, params }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const proof = isUuid(params.proofId) ? await getProof(db, { actor, proofId: params.proofId }) : null;
    if (!proof) throw notFound('The file');
    const bytes = await getObject(proof.objectKey);
    if (!bytes) throw notFound('The file');
    if (sha256Hex(bytes) !== proof.sha256) return refuseChanged(actor, proof);
    return new Response(new Uint8Array(bytes), {
      headers: {
        'Content-Type': proof.mime,
        'Content-Disposition': `attachment; filename*=UTF-8''${encodeURIComponent(proof.fileName)}`,
        'Cache-Control': 'private, max-age=3600',
        'X-Content-Type-Options': 'nosniff',
        'Content-Security-Policy': "default-src 'none'; sandbox",
      },
    });
  });
}

const isUuid = (text: string) => /^[0-9a-f]{8}(?:-[0-9a-f]{4}){3}-[0-9a-f]{12}$/iu.test(text);

async function refuseChanged(actor: Actor, proof: { readonly id: string; readonly caseId: string; readonly organisationId: string }): Promise<Response> {
  await inTransaction((tx) =>
    insertLogEntry(tx, {
      actorId: actor.userId,
      actorName: actor.displayName,
      organisationId: proof.organisationId,
      caseId: proof.caseId,
      event: 'proof.hash-differs',
      subject: 'action_proofs',
      subjectId: proof.id,
      summary: 'A stored proof no longer has the hash it came with; it was not handed out.',
    }),
  );
  return new Response('The stored file is no longer the one that was sent: its hash differs. It is not handed out. The log of the case says when this was found.', {
    status: 500,
    headers: { 'Content-Type': 'text/plain; charset=utf-8' },
  });
}
