import * as bcrypt from 'bcryptjs';
import { expect, it, vi } from 'vitest';
import { hashPassword, passwordMatches } from '~/lib/server/auth/password';

vi.mock('bcryptjs', async (original) => {
  const real = await original<typeof bcrypt>();
  return { ...real, compare: vi.fn(real.compare) };
});

it('where there is no account a password is compared all the same, at the cost of a real one', async () => {
  const compared = vi.mocked(bcrypt.compare);
  expect(await passwordMatches('not the one', null)).toBe(false);
  expect(compared).toHaveBeenCalledTimes(1);
  const nobodys = String(compared.mock.calls[0]?.[1]);
  expect(bcrypt.getRounds(nobodys)).toBe(bcrypt.getRounds(await hashPassword('the one that is meant')));
});

it('a password matches its own hash and no other', async () => {
  const kept = await hashPassword('the one that is meant');
  expect(await passwordMatches('the one that is meant', kept)).toBe(true);
  expect(await passwordMatches('the one that was meant', kept)).toBe(false);
});
