import { readdirSync, readFileSync } from 'node:fs';
import { dirname, join, relative, resolve } from 'node:path';
import { ROOT } from '../../db/up/root.mjs';

export interface SourceFile {
  /** Path from the project's folder. */
  readonly path: string;
  readonly text: string;
}

/** Every file under a folder of the project whose name ends so. */
export function sourceFiles(folder: string, endings: RegExp): SourceFile[] {
  return readdirSync(join(ROOT, folder), { withFileTypes: true, recursive: true })
    .filter((entry) => entry.isFile() && endings.test(entry.name))
    .map((entry) => relative(ROOT, join(entry.parentPath, entry.name)))
    .sort()
    .map((path) => ({ path, text: readFileSync(join(ROOT, path), 'utf8') }));
}

const IMPORT = /(?:^|[\s;}])(?:import|export)\b(?:[\s\w*{},$]*?\bfrom)?\s*\(?\s*['"]([^'"\n]+)['"]/gm;

/** What a file imports: paths from the project's folder for its own, names for packages. */
export function importsOf(file: SourceFile): string[] {
  return [...file.text.matchAll(IMPORT)].map(([, name = '']) => {
    if (name.startsWith('~/')) return `src/${name.slice(2)}`;
    if (name.startsWith('.')) return relative(ROOT, resolve(ROOT, dirname(file.path), name));
    return name;
  });
}
