import type { Run } from '~/lib/contracts/runs';
import { count } from '../words/names';
import { MOST, type MoreLink } from './waiting';

interface Firing {
  readonly underWay: readonly Run[];
  readonly cooling: readonly Run[];
  readonly planned: readonly Run[];
  /** Of which there are more than were read. */
  readonly cut: Readonly<Record<'underWay' | 'cooling' | 'planned', boolean>>;
}

const counted = (runs: readonly Run[], isCut: boolean): string => `${isCut ? 'at least ' : ''}${runs.length}`;

/** What the studio is doing, in one sentence: `2 kilns firing, 1 cooling, 1 run planned.` */
export function leadOf({ underWay, cooling, planned, cut }: Firing): string {
  const kilns = new Set(underWay.map((run) => run.kiln.id)).size;
  const parts = [
    cut.underWay
      ? `At least ${underWay.length} runs under way`
      : underWay.length > 0
        ? `${count(kilns, 'kiln')} firing`
        : 'No kiln is firing',
    ...(cooling.length > 0 ? [`${counted(cooling, cut.cooling)} cooling`] : []),
    ...(cut.planned || planned.length > 0
      ? [`${cut.planned ? 'at least ' : ''}${count(planned.length, 'run')} planned`]
      : []),
  ];
  return `${parts.join(', ')}.`;
}

/** The lists that hold the hot runs beyond the strips on the page. */
export function beyondStrips({ underWay, cooling, cut }: Firing): MoreLink[] {
  if (underWay.length + cooling.length <= MOST) return [];
  return [
    ...(underWay.length > MOST
      ? [{ href: '/runs?state=under-way', text: `All runs under way, ${counted(underWay, cut.underWay)}` }]
      : []),
    ...(cooling.length > 0
      ? [{ href: '/runs?state=cooling-down', text: `All that are cooling, ${counted(cooling, cut.cooling)}` }]
      : []),
  ];
}
