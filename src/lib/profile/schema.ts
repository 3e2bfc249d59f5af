import { z } from '../zod';

/** What a stretch of the firing is for. The order is the usual order of a firing; a profile may use any of them, in any order. */
export const STAGES = ['drying', 'melt-out', 'burnout', 'vitrification', 'casting-hold', 'cooling'] as const;
export const stageSchema = z.enum(STAGES);
export type Stage = z.infer<typeof stageSchema>;

export const PROFILE_LIMITS = {
  minSegments: 1,
  maxSegments: 64,
  minC: -20,
  maxC: 1400,
  minRateCPerH: 1,
  maxRateCPerH: 2000,
  maxHoldS: 7 * 24 * 3600,
  maxDurationS: 14 * 24 * 3600,
  maxOpenedS: 7200,
  maxInstructionLength: 500,
} as const;

/** Degrees Celsius per hour, or as fast as the kiln can (`flat-out`), or with heating off (`coast`). */
export const rateSchema = z.union([
  z.number().min(PROFILE_LIMITS.minRateCPerH).max(PROFILE_LIMITS.maxRateCPerH),
  z.literal('flat-out'),
  z.literal('coast'),
]);
export type Rate = z.infer<typeof rateSchema>;

export const segmentSchema = z.strictObject({
  stage: stageSchema,
  toC: z.number().min(PROFILE_LIMITS.minC).max(PROFILE_LIMITS.maxC),
  rateCPerH: rateSchema,
  holdS: z.number().min(0).max(PROFILE_LIMITS.maxHoldS),
  attended: z.boolean().default(false),
  drain: z.boolean().default(false),
  vent: z.enum(['open', 'closed']).default('closed'),
  instruction: z.string().max(PROFILE_LIMITS.maxInstructionLength).default(''),
  // Optional and without a default: versions that were kept before these were thought of keep their canonical form and seal.
  /** How long the kiln stands open once it has come to the target, s. */
  openedS: z.number().min(1).max(PROFILE_LIMITS.maxOpenedS).optional(),
  /** Share of its front that is open meanwhile; left out: all of it. */
  openedShare: z.number().min(0.01).max(1).optional(),
});
export type Segment = z.infer<typeof segmentSchema>;

export const profileSchema = z.strictObject({
  startC: z.number().min(PROFILE_LIMITS.minC).max(PROFILE_LIMITS.maxC),
  segments: z.array(segmentSchema).min(PROFILE_LIMITS.minSegments).max(PROFILE_LIMITS.maxSegments),
});
/** A firing profile: the temperature it starts from and its segments, each a ramp and a hold. */
export type Profile = z.infer<typeof profileSchema>;
/** A profile as it may be sent: what has a default may be left out. */
export type ProfileInput = z.input<typeof profileSchema>;
