/** Stefan-Boltzmann constant, W/(m²·K⁴). CODATA 2018, exact by the definitions of the SI. */
export const STEFAN_BOLTZMANN_W_PER_M2K4 = 5.670374419e-8;
/** Molar gas constant, J/(mol·K). CODATA 2018, exact. */
export const GAS_CONSTANT_J_PER_MOL_K = 8.314462618;
export const KELVIN_AT_0_C = 273.15;
/** Standard gravity, m/s². Exact by definition. */
export const GRAVITY_M_PER_S2 = 9.80665;
/** Boiling point of water at one atmosphere, °C. */
export const WATER_BOILS_C = 100;
/** Heat of evaporation of water at 100 °C, J/kg. Steam tables (IAPWS-95), recalled: 2256.5 kJ/kg. */
export const WATER_EVAPORATION_J_PER_KG = 2256.5e3;
/** What evaporation needs more for each kelvin below 100 °C, J/(kg·K). Steam tables, recalled: (2441.7 − 2256.5) / 75 kJ/(kg·K). */
export const WATER_EVAPORATION_SLOPE_J_PER_KG_K = 2470;
/** Heat capacity of liquid water, mean of 20-100 °C, J/(kg·K). Steam tables, recalled: (419.1 − 83.9) / 80 kJ/(kg·K). */
export const WATER_HEAT_CAPACITY_J_PER_KG_K = 4190;
/** Density of air at 20 °C and one atmosphere, kg/m³. Ideal gas, 28.96 g/mol. */
export const ROOM_AIR_KG_PER_M3 = 1.204;
export const J_PER_KWH = 3.6e6;
