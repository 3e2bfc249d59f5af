import { authRoutes } from './auth';
import { classRoutes, handoutRoutes, peopleRoutes } from './classes';
import { draftRoutes } from './drafts';
import { furnaceRoutes, kilnRoutes, tariffRoutes, thermocoupleRoutes } from './equipment';
import { logRoutes } from './logs';
import { materialRoutes } from './materials';
import { estimateRoutes, profileRoutes } from './profiles';
import { findingRoutes, reviewRoutes, runRoutes } from './runs';
import type { Route } from './route';
import { siteRoutes } from './site';

/** Every call of the HTTP contract, by noun. The OpenAPI document and the typed client are made from this. */
export const routes = {
  site: siteRoutes,
  auth: authRoutes,
  people: peopleRoutes,
  kilns: kilnRoutes,
  furnaces: furnaceRoutes,
  thermocouples: thermocoupleRoutes,
  tariffs: tariffRoutes,
  materials: materialRoutes,
  profiles: profileRoutes,
  estimates: estimateRoutes,
  drafts: draftRoutes,
  classes: classRoutes,
  handouts: handoutRoutes,
  runs: runRoutes,
  logs: logRoutes,
  findings: findingRoutes,
  review: reviewRoutes,
} as const;

export const allRoutes: readonly Route[] = Object.values(routes).flatMap(
  (group) => Object.values(group) as Route[],
);
