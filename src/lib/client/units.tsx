import { createContext, useContext, type ReactNode } from 'react';
import { METRIC, type UnitPreferences } from '~/lib/units';

const UnitsContext = createContext<UnitPreferences>(METRIC);

/** Gives an island the units that its reader has chosen. */
export function UnitsProvider(props: { readonly units: UnitPreferences; readonly children: ReactNode }) {
  return <UnitsContext value={props.units}>{props.children}</UnitsContext>;
}

export const useUnits = (): UnitPreferences => useContext(UnitsContext);
