import type { Role } from '~/lib/contracts/common';

export interface Section {
  readonly href: string;
  readonly name: string;
  /** Paths that belong to it beside its own. */
  readonly also?: readonly string[];
}

const FOR_STAFF: readonly Section[] = [
  { href: '/', name: 'Today' },
  { href: '/profiles', name: 'Profiles' },
  { href: '/runs', name: 'Runs' },
  {
    href: '/kilns',
    name: 'Kilns',
    also: ['/furnaces', '/thermocouples', '/tariffs', '/materials'],
  },
  { href: '/classes', name: 'Classes', also: ['/handouts'] },
];

const FOR_STUDENTS: readonly Section[] = [
  { href: '/', name: 'Today' },
  { href: '/handouts', name: 'My firings' },
  { href: '/profiles', name: 'My profiles' },
  { href: '/runs', name: 'Runs' },
  { href: '/materials', name: 'Materials' },
];

/** What the header offers; a person who is nothing but a student sees the student's. */
export const sectionsFor = (roles: readonly Role[]): readonly Section[] =>
  roles.some((role) => role !== 'student') ? FOR_STAFF : FOR_STUDENTS;

const within = (path: string, base: string): boolean => path === base || path.startsWith(`${base}/`);

export const isCurrent = (section: Section, path: string): boolean =>
  section.href === '/'
    ? path === '/'
    : [section.href, ...(section.also ?? [])].some((base) => within(path, base));
