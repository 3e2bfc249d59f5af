import { plannedCurve } from './planned';
import { PROFILE_LIMITS, profileSchema, type Profile } from './schema';

/** What is wrong and where: `segments.2.toC`. */
export interface ProfileIssue {
  path: string;
  message: string;
}
export type Validated = { ok: true; profile: Profile } | { ok: false; issues: ProfileIssue[] };

export interface ValidationContext {
  /** Highest temperature of the kiln it is for, °C; null: no kiln chosen. */
  kilnMaxC?: number | null;
  /** Lengths of `flat-out` and `coast` ramps as the kiln model gives them. */
  kilnRampsS?: readonly (number | null)[];
}

/**
 * Checks a profile from outside: its shape, the range of each number, the kiln's limit and the length of the whole.
 *
 * @param input anything
 * @returns the profile with defaults filled in, or every issue found
 */
export function validateProfile(input: unknown, context: ValidationContext = {}): Validated {
  const parsed = profileSchema.safeParse(input);
  if (!parsed.success)
    return {
      ok: false,
      issues: parsed.error.issues.map((issue) => ({ path: issue.path.join('.'), message: issue.message })),
    };
  const issues = issuesOf(parsed.data, context);
  return issues.length === 0 ? { ok: true, profile: parsed.data } : { ok: false, issues };
}

/** Issues of a profile that has the right shape already. */
export function issuesOf(
  profile: Profile,
  { kilnMaxC = null, kilnRampsS = [] }: ValidationContext = {},
): ProfileIssue[] {
  const issues: ProfileIssue[] = [];
  if (kilnMaxC !== null) {
    profile.segments.forEach((segment, index) => {
      if (segment.toC > kilnMaxC)
        issues.push({
          path: `segments.${index}.toC`,
          message: `${segment.toC} °C is above the kiln's limit of ${kilnMaxC} °C`,
        });
    });
  }
  const { durationS } = plannedCurve(profile, kilnRampsS);
  if (durationS > PROFILE_LIMITS.maxDurationS)
    issues.push({
      path: 'segments',
      message: `takes ${(durationS / 86400).toFixed(1)} days as planned; at most ${PROFILE_LIMITS.maxDurationS / 86400} days are allowed`,
    });
  return issues;
}
