import { notFound } from '#app/domain/errors.ts';
import { respond } from '#app/http/to-response.server.ts';

/** An address that no page has: a route of its own, so that the head of the page knows who is signed in. */
export function loader() {
  return respond(() => Promise.reject(notFound('This address')));
}

/** Never shown: the loader always refuses. Without a component the answer would not be a page. */
export default function Nowhere() {
  return null;
}
