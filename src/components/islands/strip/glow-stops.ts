import { DRAPER_POINT_C, glow } from '~/lib/units';

export interface GlowStop {
  readonly tempC: number;
  readonly colour: string;
  readonly opacity: number;
}

/** Over this many degrees above the Draper point the strip fades in. */
const FADE_C = 60;

/**
 * The glow as it is seen on a dark body: its hue as bright as its light, drawn solid, so that it is as dark red on
 * white paper as on black. The square root lifts the dull reds, which an eye used to a dark kiln sees well.
 */
function stopAt(tempC: number): GlowStop {
  const { hex, alpha } = glow(tempC);
  const bright = Math.sqrt(alpha);
  const part = (from: number): number => Math.round(parseInt(hex.slice(from, from + 2), 16) * bright);
  return {
    tempC,
    colour: `rgb(${part(1)} ${part(3)} ${part(5)})`,
    opacity: Math.min(1, (tempC - DRAPER_POINT_C) / FADE_C),
  };
}

/** The colours of heat from where they begin to be seen to the hottest that a profile may ask for, every 25 °C. */
export const GLOW_STOPS: readonly GlowStop[] = [
  { ...stopAt(DRAPER_POINT_C + 1), opacity: 0 },
  ...Array.from({ length: 35 }, (_unused, index) => stopAt(550 + index * 25)),
];
