import { createHmac } from 'node:crypto';
import { config } from '../config';
import { inTransaction, type Tx } from '../database';
import { HoldfastError } from '../errors';
import {
  deleteThrottlesBefore,
  forgetFailures,
  reserveAttempt,
  returnAttempt,
  type Pace,
} from '../repositories/throttles';

const ACCOUNT: Pace = { freeFailures: 5, longestWaitS: 30, forgetAfterS: 900 };
const ADDRESS: Pace = { freeFailures: 20, longestWaitS: 30, forgetAfterS: 900 };
const KEPT_S = 24 * 3600;

interface Bucket {
  readonly key: string;
  readonly pace: Pace;
  readonly own: boolean;
}

/** Only a keyed hash is kept: the table tells nobody which accounts and addresses were tried. */
const keyOf = (kind: string, value: string): string =>
  createHmac('sha256', config().secret).update(`${kind}:${value}`).digest('hex');

/** An IPv6 network is one address here: its holder has 2^64 of them. */
export const networkOf = (address: string): string =>
  address.includes('.') ? address.replace(/^::ffff:/, '') : address.split(':').slice(0, 4).join(':');

/**
 * Which buckets an attempt counts in. A browser that has signed in to the account before counts alone, so that strangers
 * who try passwords slow themselves down and never the person.
 */
function bucketsOf(account: string, address: string, knownBrowser: boolean): Bucket[] {
  if (knownBrowser) return [{ key: keyOf('browser', account), pace: ACCOUNT, own: true }];
  return [
    { key: keyOf('account', account), pace: ACCOUNT, own: true },
    { key: keyOf('address', networkOf(address)), pace: ADDRESS, own: false },
  ];
}

export interface Attempt {
  /** The attempt was right after all: it does not count. */
  succeeded(tx: Tx): Promise<void>;
}

/** Counts an attempt, or refuses it with the seconds to wait. Slows down, and locks nobody out. */
export async function countAttempt(
  account: string,
  address: string,
  knownBrowser: boolean,
): Promise<Attempt> {
  const buckets = bucketsOf(account, address, knownBrowser);
  await inTransaction(async (tx) => {
    for (const { key, pace } of buckets) {
      const waitS = await reserveAttempt(tx, key, pace);
      if (waitS > 0) throw tooMany(waitS);
    }
  });
  return {
    succeeded: async (tx) => {
      for (const { key, own } of buckets) await (own ? forgetFailures(tx, key) : returnAttempt(tx, key));
      await deleteThrottlesBefore(tx, new Date(Date.now() - KEPT_S * 1000));
    },
  };
}

const tooMany = (waitS: number) =>
  new HoldfastError('too-many', `Several attempts failed. Wait ${waitS} s, then try again.`, {
    retryAfterS: waitS,
  });
