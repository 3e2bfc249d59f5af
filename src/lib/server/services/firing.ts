import { FiringTooStiff } from '~/lib/thermal/march';
import { simulate, type FiringInput } from '~/lib/thermal/simulate';
import type { Simulation } from '~/lib/thermal/simulation';
import { notValid } from '../errors';

/** Runs the models; 422 for a kiln or a load so far from any real one that it would hold the server up. */
export function computed<T>(work: () => T): T {
  try {
    return work();
  } catch (error) {
    if (!(error instanceof FiringTooStiff)) throw error;
    throw notValid(
      'This firing cannot be computed: size, power or masses of kiln and load are far from any real ones. Check them.',
      [{ path: 'kiln', message: 'power or mass out of all proportion to size' }],
    );
  }
}

/** Fires a load in a kiln by the models. */
export const simulated = (input: FiringInput): Simulation => computed(() => simulate(input));
