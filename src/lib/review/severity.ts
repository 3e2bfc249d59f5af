import type { ComputedFinding, Severity } from './types';

/**
 * How much a finding matters. Serious is what may have cost the casting or leaves the record in doubt; a note is what a
 * technician should know and need do nothing about. The boundaries are Holdfast's own judgement.
 */
export function severityOf(finding: ComputedFinding): Severity {
  const byC = finding.byC ?? 0;
  const byS = Math.abs(finding.byS ?? 0);
  if (finding.remarks.includes('material-limit') || finding.remarks.includes('steep-recovery'))
    return 'serious';
  switch (finding.kind) {
    case 'overshoot':
      return byC > 30 ? 'serious' : 'warn';
    case 'undershoot':
      return byC > 50 ? 'serious' : 'warn';
    case 'late':
    case 'hold-long':
      return byS > 3600 ? 'warn' : 'note';
    case 'hold-short':
    case 'stalled':
      return byS > 3600 ? 'serious' : 'warn';
    case 'too-steep':
    case 'cooled-too-fast':
      return 'warn';
    case 'opened':
      return finding.expected ? 'note' : 'warn';
    case 'power-cut':
      return byC > 100 || finding.remarks.includes('open-ended') ? 'serious' : 'warn';
    case 'sensor-spike':
    case 'gap':
    case 'clock-jump':
      return finding.kind === 'gap' && byS > 1800 ? 'warn' : 'note';
    case 'sensor-open':
    case 'sensor-stuck':
    case 'channels-disagree':
      return 'warn';
    case 'ended-early':
      return 'serious';
  }
}
