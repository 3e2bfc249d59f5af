import type { Role } from '~/lib/contracts/common';
import type { Stage } from '~/lib/profile/schema';

/** The words on screen for what the contract names by code. */
export const ROLE_NAMES: Record<Role, string> = {
  owner: 'Owner',
  technician: 'Technician',
  teacher: 'Teacher',
  student: 'Student',
};

export const roleList = (roles: readonly Role[]): string =>
  roles.map((role, index) => (index ? ROLE_NAMES[role].toLowerCase() : ROLE_NAMES[role])).join(', ');

export const STAGE_NAMES: Record<Stage, string> = {
  drying: 'Drying',
  'melt-out': 'Melt-out',
  burnout: 'Burnout',
  vitrification: 'Vitrification',
  'casting-hold': 'Casting hold',
  cooling: 'Cooling',
};

export const LINING_NAMES = {
  brick: 'Brick',
  fibre: 'Fibre',
  'brick-and-fibre': 'Brick and fibre',
} as const;

export const FUEL_NAMES = { propane: 'Propane', 'natural-gas': 'Natural gas' } as const;

export const METERED_NAMES = {
  electricity: 'Electricity',
  propane: 'Propane',
  'natural-gas': 'Natural gas',
} as const;

export const PER_NAMES = { kWh: 'kWh', kg: 'kg', m3: 'm³' } as const;

type Look = 'open' | 'on' | 'wait' | 'done' | 'off';

/** States of versions, runs and handouts: the word and the shape that goes with it. */
export const STATES = {
  draft: ['Draft', 'open'],
  'in-review': ['In review', 'wait'],
  approved: ['Approved', 'done'],
  retired: ['Retired', 'off'],
  planned: ['Planned', 'open'],
  'under-way': ['Under way', 'on'],
  'cooling-down': ['Cooling down', 'wait'],
  closed: ['Closed', 'done'],
  'broken-off': ['Broken off', 'off'],
  ahead: ['Ahead', 'open'],
  'in-force': ['In force', 'done'],
  over: ['Over', 'off'],
  withdrawn: ['Withdrawn', 'off'],
  running: ['Running', 'done'],
  archived: ['Archived', 'off'],
} as const satisfies Record<string, readonly [string, Look]>;
export type StateCode = keyof typeof STATES;

export const TOLERANCE_NAMES = {
  '1': 'Class 1',
  '2': 'Class 2',
  '3': 'Class 3',
  special: 'Special limits',
  standard: 'Standard limits',
} as const;

export const CONFIDENCE_NAMES = {
  published: 'Published',
  memory: 'From memory',
  'common-practice': 'Common practice',
  derived: 'Worked out',
} as const;

/** `3 segments`, `1 segment`. */
export const count = (n: number, one: string, many = `${one}s`): string => `${n} ${n === 1 ? one : many}`;

export const EVENT_NAMES = {
  submitted: 'submitted for review',
  approved: 'approved and sealed',
  returned: 'returned',
  retired: 'retired',
} as const;
