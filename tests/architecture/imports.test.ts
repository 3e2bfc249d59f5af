import { describe, expect, it } from 'vitest';
import { importsOf, sourceFiles } from '../helpers/source-files';

/** The rooms, the first that a path begins with; the most particular stand first. */
const ROOMS = [
  [
    'core',
    /^src\/lib\/(units|materials|profile|thermal|sensors|logs|review|planning|learning|methods)(\/|$)/,
  ],
  ['core', /^src\/lib\/zod(\.ts)?$/],
  ['contracts', /^src\/lib\/contracts(\/|$)/],
  ['client', /^src\/lib\/client\//],
  ['config', /^src\/lib\/server\/config/],
  ['errors', /^src\/lib\/server\/errors/],
  ['log', /^src\/lib\/server\/log(\.ts)?$/],
  ['database', /^src\/lib\/server\/database/],
  ['models', /^src\/lib\/server\/models(\/|$)/],
  ['repositories', /^src\/lib\/server\/repositories\//],
  ['services', /^src\/lib\/server\/services\//],
  ['auth', /^src\/lib\/server\/auth\//],
  ['bodies', /^src\/lib\/server\/http\/(pagination|json-body)/],
  ['http', /^src\/lib\/server\/(http\/|openapi)/],
  ['words', /^src\/components\/words\//],
  ['islands', /^src\/components\/islands\//],
  ['components', /^src\/components\//],
  ['layouts', /^src\/layouts\//],
  ['pages', /^src\/pages\//],
  ['middleware', /^src\/middleware/],
  ['styles', /^src\/styles\//],
  ['manifest', /^package\.json$/],
] as const;
type Room = (typeof ROOMS)[number][0];

/** Who may import whom, beside its own room and the core, which is open to all. */
const MAY_IMPORT: Record<Room, readonly Room[]> = {
  core: [],
  contracts: [],
  client: ['contracts'],
  config: [],
  errors: ['contracts'],
  log: ['config'],
  database: ['config', 'models'],
  models: ['contracts'],
  bodies: ['errors'],
  repositories: ['models', 'database', 'errors', 'bodies', 'contracts'],
  services: [
    'repositories',
    'database',
    'errors',
    'auth',
    'http',
    'bodies',
    'config',
    'contracts',
    'log',
    'manifest',
  ],
  auth: ['config', 'errors', 'services', 'contracts'],
  http: ['services', 'bodies', 'auth', 'errors', 'config', 'log', 'contracts', 'manifest'],
  words: ['contracts'],
  islands: ['words', 'client', 'contracts'],
  components: ['words', 'islands', 'client', 'contracts'],
  layouts: ['components', 'words', 'contracts', 'styles'],
  pages: [
    'layouts',
    'words',
    'config',
    'components',
    'islands',
    'http',
    'services',
    'auth',
    'errors',
    'contracts',
    'styles',
  ],
  middleware: ['auth', 'http', 'services', 'errors', 'log', 'contracts'],
  styles: [],
  manifest: [],
};

const roomOf = (path: string): Room | undefined => ROOMS.find(([, pattern]) => pattern.test(path))?.[0];
const files = sourceFiles('src', /\.(ts|tsx|astro)$/).filter(({ path }) => path !== 'src/env.d.ts');

const edges = files.flatMap((file) => importsOf(file).map((target) => ({ file: file.path, target })));
const isOwn = (target: string) => target.startsWith('src/') || target === 'package.json';

describe('the rooms of the source', () => {
  it('hold every file', () => {
    expect(files.length).toBeGreaterThan(100);
    expect(files.filter(({ path }) => !roomOf(path)).map(({ path }) => path)).toEqual([]);
  });

  it('import only as the table of rooms allows', () => {
    const own = edges.filter(({ target }) => isOwn(target));
    expect(own.length).toBeGreaterThan(300);
    const wrong = own.filter(({ file, target }) => {
      const from = roomOf(file);
      const to = roomOf(target);
      return !from || !to || !(from === to || to === 'core' || MAY_IMPORT[from].includes(to));
    });
    expect(wrong.map(({ file, target }) => `${file} → ${target}`)).toEqual([]);
  });

  it('keep Node and the database out of the core, the contract and the browser', () => {
    const apart: readonly (Room | undefined)[] = ['core', 'contracts', 'client', 'islands'];
    const wrong = edges.filter(
      ({ file, target }) =>
        apart.includes(roomOf(file)) &&
        /^(node:|fs$|path$|crypto$|pg|sequelize|umzug|jose|bcryptjs|pino|busboy|astro)/.test(target),
    );
    expect(wrong.map(({ file, target }) => `${file} → ${target}`)).toEqual([]);
  });

  it('let the core use only the schema library and the tokeniser of log files', () => {
    const packages = edges.filter(({ file, target }) => roomOf(file) === 'core' && !isOwn(target));
    const others = packages.filter(({ target }) => !['zod', 'papaparse'].includes(target));
    expect(others.map(({ file, target }) => `${file} → ${target}`)).toEqual([]);
  });

  it('speak SQL in repositories only, where the models are', () => {
    const allowed: readonly (Room | undefined)[] = ['models', 'repositories', 'database'];
    const wrong = edges.filter(
      ({ file, target }) =>
        /^(sequelize|pg|pg-copy-streams)(\/|$)/.test(target) &&
        !allowed.includes(roomOf(file)) &&
        // The one place that tells a lost connection from other errors.
        file !== 'src/lib/server/http/failure.ts',
    );
    expect(wrong.map(({ file, target }) => `${file} → ${target}`)).toEqual([]);
  });

  it('take the schema library from one file, which keeps it from compiling code', () => {
    const wrong = edges.filter(({ file, target }) => target === 'zod' && file !== 'src/lib/zod.ts');
    expect(wrong.map(({ file }) => file)).toEqual([]);
  });
});
