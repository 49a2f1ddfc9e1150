/** Set while the device keeps the sites of a signed-in person, or pages of cases. */
export const personMark = 'scorchline.knows-person';

/** Nobody is signed in here: what a start without a connection would show of the last person's sites and cases goes. Unsent reports stay. */
export async function forgetPerson(): Promise<void> {
  if (localStorage.getItem(personMark) === null) return;
  const { forgetPersonView } = await import('./kept-views.ts');
  await forgetPersonView();
}
