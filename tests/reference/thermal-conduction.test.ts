import { describe, expect, it } from 'vitest';
import oneTerm from '../../fixtures/references/heat-one-term.json' with { type: 'json' };
import semiInfinite from '../../fixtures/references/heat-semi-infinite.json' with { type: 'json' };
import stefan from '../../fixtures/references/heat-stefan.json' with { type: 'json' };
import shellLag from '../../fixtures/references/heat-shell-lag.json' with { type: 'json' };
import wall from '../../fixtures/references/heat-wall.json' with { type: 'json' };
import wallStep from '../../fixtures/references/heat-wall-step.json' with { type: 'json' };
import {
  lagShapesRun,
  oneTermRun,
  semiInfiniteRun,
  shellLagRun,
  stefanRun,
  wallRun,
  wallStepRun,
} from './thermal-conduction-runs';

describe(`${wall.title}: ${wall.cases[0]?.source ?? ''}`, () => {
  it.each(wall.cases.map(({ id }, i) => [id, i] as const))('%s', (_id, i) => {
    expect(wallRun(i)).toBeLessThanOrEqual(1);
  });
  it('notices a conductivity or a heat capacity that is 1 % off', () => {
    expect(wallRun(0, { conductivity: 1.01 })).toBeGreaterThan(1);
    expect(wallRun(0, { capacity: 0.99 })).toBeGreaterThan(1);
  });
});

describe(shellLag.title, () => {
  it(`an 8 mm shell: ${shellLag.cases[0]?.source ?? ''}`, () => {
    expect(shellLagRun()).toBeLessThanOrEqual(1);
  });
  it('notices a conductivity that is 1 % off', () => {
    expect(shellLagRun({ conductivity: 1.01 })).toBeGreaterThan(1);
  });
  it(`walls and cylinders with a film: ${shellLag.cases[1]?.source ?? ''}`, () => {
    expect(lagShapesRun()).toBeLessThanOrEqual(1);
  });
  it('notices a heat capacity that is 0.2 % off', () => {
    expect(lagShapesRun({ capacity: 1.002 })).toBeGreaterThan(1);
  });
});

describe(`${semiInfinite.title}: ${semiInfinite.cases[0]?.source ?? ''}`, () => {
  it.each(['Ts', 'flux', 'film', 'ramp'] as const)('face condition: %s', (column) => {
    expect(semiInfiniteRun(column)).toBeLessThanOrEqual(1);
  });
  it('notices a conductivity or a film that is 3 % off', () => {
    expect(semiInfiniteRun('flux', { conductivity: 1.03 })).toBeGreaterThan(1);
    expect(semiInfiniteRun('film', { film: 1.03 })).toBeGreaterThan(1);
  });
});

describe(`${wallStep.title}: ${wallStep.cases[0]?.source ?? ''}`, () => {
  it('centre, surface and heat taken up, Bi 0.1 to 10', () => {
    expect(wallStepRun()).toBeLessThanOrEqual(1);
  });
  it('notices a film that is 2 % off', () => {
    expect(wallStepRun({ film: 1.02 })).toBeGreaterThan(1);
  });
});

describe(`${oneTerm.title}: ${oneTerm.cases[0]?.source ?? ''}`, () => {
  it.each(['wall', 'cylinder'] as const)('%s: root and coefficient, Bi 0.1 to 10', (shape) => {
    expect(oneTermRun(shape)).toBeLessThanOrEqual(1);
  });
  it('notices a heat capacity that is 1 % off, which moves the root by 0.5 %', () => {
    expect(oneTermRun('wall', { capacity: 1.01 })).toBeGreaterThan(1);
    expect(oneTermRun('cylinder', { capacity: 1.01 })).toBeGreaterThan(1);
  });
});

describe(`${stefan.title}: ${stefan.cases[0]?.source ?? ''}`, () => {
  it('depth of the dry front, Stefan numbers 0.05 to 5', () => {
    expect(stefanRun()).toBeLessThanOrEqual(1);
  });
  it('notices a latent heat that is 4 % off, which moves the front by 2 %', () => {
    expect(stefanRun({ latent: 1.04 })).toBeGreaterThan(1);
  });
});
