const uuid = /^[0-9a-f]{8}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{12}$/u;

/** Whether a part of an address can be the id of a release at all. */
export const isUuid = (text: string): boolean => uuid.test(text);
