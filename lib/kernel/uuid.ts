const UUID = /^[0-9a-f]{8}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{12}$/;

/** Ids are asked this before they reach the database, which answers anything else with an error. */
export const isUuid = (text: unknown): text is string => typeof text === 'string' && UUID.test(text);
