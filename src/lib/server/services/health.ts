import { version } from '../../../../package.json' with { type: 'json' };
import { database } from '../database';

const PATIENCE_MS = 2000;

/** Whether this process can reach its database, within two seconds. */
export async function health(): Promise<{
  status: 'ok' | 'unavailable';
  database: 'ok' | 'away';
  version: string;
}> {
  const reached = await Promise.race([
    database()
      .query('select 1')
      .then(
        () => true,
        () => false,
      ),
    new Promise<boolean>((resolve) => setTimeout(resolve, PATIENCE_MS, false).unref()),
  ]);
  return { status: reached ? 'ok' : 'unavailable', database: reached ? 'ok' : 'away', version };
}
