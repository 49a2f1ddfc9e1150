const query = (values: Readonly<Record<string, string | null>>): string => {
  const set = Object.entries(values).flatMap(([name, value]) => (value ? [[name, value]] : []));
  return set.length > 0 ? `?${new URLSearchParams(set).toString()}` : '';
};

export const newReportAddress = (guestCode: string | null): string => `/report${query({ at: guestCode })}`;
export const reportAddress = (clientId: string, guestCode: string | null): string => `/report${query({ at: guestCode, report: clientId })}`;
/** Where the phone sends photos of a report under way, one at a time. */
export const photosAddress = (clientId: string, guestCode: string | null): string => `/report/${clientId}/photos${query({ at: guestCode })}`;
/** Where the phone sends the words. */
export const wordsAddress = (clientId: string, guestCode: string | null): string => `/report/${clientId}/words${query({ at: guestCode })}`;
/** With the link's code, so that another mark can be reported from there, and the id whose words may leave the device. */
export const receivedAddress = (receipt: string, guestCode: string | null, clientId: string): string => `/received/${receipt}${query({ at: guestCode, report: clientId })}`;
