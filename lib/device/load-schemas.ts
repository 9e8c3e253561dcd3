import type { RecordSchemas } from './record-schemas';

/**
 * The schemas, in a piece of the program of its own that arrives after the list of pours is drawn.
 * @throws where that piece is not on this device and there is no network
 */
export async function loadSchemas(): Promise<RecordSchemas> {
  return (await import('./record-schemas')).recordSchemas;
}
