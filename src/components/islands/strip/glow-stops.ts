import { DRAPER_POINT_C, glow } from '~/lib/units';

export interface GlowStop {
  readonly tempC: number;
  readonly colour: string;
  readonly opacity: number;
}

const stopAt = (tempC: number): GlowStop => {
  const { hex, alpha } = glow(tempC);
  return { tempC, colour: hex, opacity: alpha };
};

/** The colours of heat from where they begin to be seen to the hottest that a profile may ask for, every 25 °C. */
export const GLOW_STOPS: readonly GlowStop[] = [
  { ...stopAt(DRAPER_POINT_C + 1), tempC: DRAPER_POINT_C, opacity: 0 },
  ...Array.from({ length: 35 }, (_unused, index) => stopAt(550 + index * 25)),
];
