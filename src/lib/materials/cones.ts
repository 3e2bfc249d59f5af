/**
 * Temperatures at which self-supporting pyrometric cones are down, °C, by the rate of the last 100 °C of heating.
 * Source: reproductions of a cone maker's chart (three, agreeing; 60 and 150 °C/h converted from °F). The 15 °C/h values of
 * cones 07 to 5 and 7 to 10 are recalled. Cones 022 to 020 are left out: their columns do not fit one law.
 */
export interface Cone {
  readonly name: string;
  readonly at15C: number;
  readonly at60C: number;
  readonly at150C: number;
  /** Small cones at 300 °C/h, where the chart has them. */
  readonly smallAt300C: number | null;
}

const ROWS: [string, number, number, number, number?][] = [
  ['019', 656, 678, 695, 723],
  ['018', 686, 715, 734],
  ['017', 705, 738, 763],
  ['016', 742, 772, 796, 825],
  ['015', 750, 791, 818],
  ['014', 757, 807, 838],
  ['013', 807, 837, 861],
  ['012', 843, 861, 882, 900],
  ['011', 857, 875, 894],
  ['010', 891, 903, 915],
  ['09', 907, 920, 930],
  ['08', 922, 942, 956, 983],
  ['07', 962, 976, 987],
  ['06', 981, 998, 1013],
  ['05', 1021, 1031, 1044],
  ['04', 1046, 1063, 1077],
  ['03', 1071, 1086, 1104],
  ['02', 1078, 1102, 1122],
  ['01', 1093, 1119, 1138],
  ['1', 1109, 1137, 1154],
  ['2', 1112, 1142, 1164],
  ['3', 1115, 1152, 1170],
  ['4', 1141, 1162, 1183],
  ['5', 1159, 1186, 1207],
  ['6', 1185, 1222, 1243],
  ['7', 1201, 1239, 1257],
  ['8', 1211, 1249, 1271],
  ['9', 1224, 1260, 1280],
  ['10', 1251, 1285, 1305],
];

export const cones: readonly Cone[] = ROWS.map(([name, at15C, at60C, at150C, smallAt300C]) => ({
  name,
  at15C,
  at60C,
  at150C,
  smallAt300C: smallAt300C ?? null,
}));
