import {
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';
import * as column from './columns';

/** A kiln: what stands on its plate, and what its studio knows of it. Columns of the other energy are null. */
export class KilnRow extends Model<InferAttributes<KilnRow>, InferCreationAttributes<KilnRow>> {
  declare studioId: string;
  declare id: string;
  declare name: string;
  declare nameKey: CreationOptional<string>;
  declare energy: string;
  declare innerWidthM: number;
  declare innerDepthM: number;
  declare innerHeightM: number;
  declare lining: string;
  declare liningM: number;
  declare liningLayers: object[];
  declare maxC: number;
  declare ventM3PerH: number | null;
  declare waitBandC: number | null;
  declare programmerSegments: number | null;
  declare programmerMaxRateCPerH: number | null;
  declare openAtC: number;
  declare lossFactor: number;
  declare heatCapacityFactor: number;
  declare thermocoupleLagS: number;
  declare thermocoupleOffsetC: number;
  declare ratedKW: number | null;
  declare voltsV: number | null;
  declare supplyV: number | null;
  declare ratedPowerShare: number | null;
  declare burnerKW: number | null;
  declare fuel: string | null;
  declare excessAirShare: number | null;
  declare note: string;
  declare thermocoupleId: string | null;
  declare tariffId: string | null;
  declare revision: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
  declare archivedAt: CreationOptional<Date | null>;
}

export function initKilns(sequelize: Sequelize): void {
  KilnRow.init(
    {
      studioId: column.key,
      id: column.key,
      name: column.text,
      nameKey: column.maybeText,
      energy: column.text,
      innerWidthM: column.number,
      innerDepthM: column.number,
      innerHeightM: column.number,
      lining: column.text,
      liningM: column.number,
      liningLayers: column.json,
      maxC: column.number,
      ventM3PerH: { ...column.maybeNumber, field: 'vent_m3_per_h' },
      waitBandC: column.maybeNumber,
      programmerSegments: column.maybeWhole,
      programmerMaxRateCPerH: { ...column.maybeNumber, field: 'programmer_max_rate_c_per_h' },
      openAtC: column.number,
      lossFactor: column.number,
      heatCapacityFactor: column.number,
      thermocoupleLagS: column.number,
      thermocoupleOffsetC: column.number,
      ratedKW: { ...column.maybeNumber, field: 'rated_kw' },
      voltsV: column.maybeNumber,
      supplyV: column.maybeNumber,
      ratedPowerShare: column.maybeNumber,
      burnerKW: { ...column.maybeNumber, field: 'burner_kw' },
      fuel: column.maybeText,
      excessAirShare: column.maybeNumber,
      note: column.textOrEmpty,
      thermocoupleId: column.maybeUuid,
      tariffId: column.maybeUuid,
      revision: column.revision,
      createdAt: column.now,
      updatedAt: column.now,
      archivedAt: column.maybeInstant,
    },
    { sequelize, tableName: 'kilns' },
  );
}
