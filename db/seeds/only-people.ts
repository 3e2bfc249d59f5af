import pg from 'pg';
import { seedPeople } from './people';

/** The two demo studios and their people, and nothing that they did: for benchmarks. */
const client = new pg.Client(process.env['DATABASE_URL']);
await client.connect();
await seedPeople(client);
await client.end();
