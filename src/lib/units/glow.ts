import { CIE_1931 } from './cie-1931';

/** Below it a body gives off no light that can be seen (J. W. Draper, 1847: 977 °F). */
export const DRAPER_POINT_C = 525;

/** Where the glow is taken to be at its full strength on screen: the hottest a profile may ask for. */
const FULL_GLOW_C = 1400;

/** Second radiation constant hc/k, m·K (CODATA 2018, exact). */
const SECOND_RADIATION_M_K = 1.438776877e-2;

/**
 * Tristimulus values of a black body, up to a common factor that does not depend on its temperature: Planck's law
 * summed every 10 nm from 380 to 780 nm against the CIE 1931 2° observer. Chromaticity agrees with published tables
 * of the Planckian locus within 0.0001 from 1000 to 2900 K; analytic fits of the observer lose the deep red there.
 *
 * @param tempK absolute temperature, K, 700-10 000
 * @returns X, Y, Z; Y is proportional to luminance
 */
export function blackBodyXyz(tempK: number): [number, number, number] {
  let sumX = 0;
  let sumY = 0;
  let sumZ = 0;
  for (const [wavelengthNm, x, y, z] of CIE_1931) {
    const radiance =
      (wavelengthNm / 560) ** -5 / Math.expm1(SECOND_RADIATION_M_K / (wavelengthNm * 1e-9 * tempK));
    sumX += radiance * x;
    sumY += radiance * y;
    sumZ += radiance * z;
  }
  return [sumX, sumY, sumZ];
}

/** sRGB transfer curve (IEC 61966-2-1), 0-1 in and out. */
const encoded = (linear: number): number =>
  linear <= 0.0031308 ? 12.92 * linear : 1.055 * linear ** (1 / 2.4) - 0.055;

/** XYZ to linear sRGB, D65 (IEC 61966-2-1); what lies outside its triangle is moved onto its edge, the largest part is 1. */
function toHex([x, y, z]: [number, number, number]): string {
  const parts = [
    3.2406 * x - 1.5372 * y - 0.4986 * z,
    -0.9689 * x + 1.8758 * y + 0.0415 * z,
    0.0557 * x - 0.204 * y + 1.057 * z,
  ].map((part) => Math.max(0, part));
  const largest = Math.max(...parts);
  const bytes = parts.map((part) => Math.round(255 * encoded(part / largest)));
  return `#${bytes.map((byte) => byte.toString(16).padStart(2, '0')).join('')}`;
}

const logLuminance = (tempC: number): number => Math.log(blackBodyXyz(tempC + 273.15)[1]);
const DARK = logLuminance(DRAPER_POINT_C);
const BRIGHT = logLuminance(FULL_GLOW_C);

export type Glow = { hex: string; alpha: number };

/**
 * Colour of a body glowing at a temperature, for the strip beside a temperature axis. The hue is that of its light
 * at full brightness; how much of it shows follows the logarithm of its luminance (Fechner), from nothing at the
 * Draper point to all of it at 1400 °C.
 *
 * @param tempC any temperature, °C
 * @returns sRGB as `#rrggbb` and alpha 0-1 (0 below 525 °C)
 */
export function glow(tempC: number): Glow {
  if (!(tempC > DRAPER_POINT_C)) return { hex: '#000000', alpha: 0 };
  const share = (logLuminance(tempC) - DARK) / (BRIGHT - DARK);
  return { hex: toHex(blackBodyXyz(tempC + 273.15)), alpha: Math.round(Math.min(1, share) * 1000) / 1000 };
}
