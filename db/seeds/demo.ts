import pg from 'pg';
import { database } from '~/lib/server/database';
import { seedPeople } from './people';
import { seedScenario } from './scenario/seed';

/** `DATABASE_URL` is the migrating role's, for the people; the scenario goes through the services, as the application. */
const client = new pg.Client(process.env['DATABASE_URL']);
await client.connect();
await seedPeople(client);
await client.end();
await seedScenario(new Date());
await database().close();
