/** Address of the script that opens the report page without a connection. */
const script = '/service-worker.js';

/** Only in a built application: in development it would stand between the page and the module server. */
export function registerServiceWorker(): void {
  if (!import.meta.env.PROD || !('serviceWorker' in navigator)) return;
  // Refused by the browser's settings: the page works as it does without.
  navigator.serviceWorker.register(script, { updateViaCache: 'none' }).catch(() => undefined);
}

/** Whether this browser sends what waits when the page is closed. */
export async function sendsInBackground(): Promise<boolean> {
  const registration = await navigator.serviceWorker?.getRegistration();
  return registration?.active !== undefined && registration.active !== null && 'sync' in registration;
}
