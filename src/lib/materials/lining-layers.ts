/** One layer of a kiln's wall, from the hot face outwards. */
export type LiningLayer = { material: string; thicknessM: number };

const CASING_M = 0.001;
const MOST_BOARD_M = 0.025;

/**
 * Layers that a lining of a kind and thickness is taken to have where the studio has not said otherwise (common
 * practice): brick alone, fibre blanket before backing board, or brick at the hot face before blanket; then a
 * steel casing of 1 mm, which the thickness does not count.
 *
 * @param lining what the plate says the kiln is lined with
 * @param liningM whole thickness of the lining, m
 * @param maxC highest temperature of the kiln, °C; above 1230 °C the brick is of group 26
 * @returns layers from the hot face to the casing; without the casing their thicknesses add up to `liningM`
 */
export function defaultLayers(
  lining: 'brick' | 'fibre' | 'brick-and-fibre',
  liningM: number,
  maxC: number,
): LiningLayer[] {
  const brick = maxC > 1230 ? 'firebrick-26' : 'firebrick-23';
  const casing = { material: 'casing-steel', thicknessM: CASING_M };
  if (lining === 'brick') return [{ material: brick, thicknessM: liningM }, casing];
  if (lining === 'brick-and-fibre') {
    const brickM = liningM * 0.6;
    return [
      { material: brick, thicknessM: brickM },
      { material: 'fibre-blanket', thicknessM: liningM - brickM },
      casing,
    ];
  }
  const boardM = Math.min(MOST_BOARD_M, liningM * 0.2);
  return [
    { material: 'fibre-blanket', thicknessM: liningM - boardM },
    { material: 'backing-board', thicknessM: boardM },
    casing,
  ];
}
