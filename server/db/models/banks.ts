import {
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type NonAttribute,
  type Sequelize,
} from 'sequelize';

import type { BankEventKind, BankFields } from '@/lib/contract/banks';

import type { CellType } from './cells';
import {
  instant,
  json,
  longText,
  optionalReal,
  optionalString,
  optionalWhole,
  string,
  textKey,
  uuidKey,
  whole,
  yesNo,
} from './columns';

export class Bank extends Model<InferAttributes<Bank>, InferCreationAttributes<Bank>> {
  declare id: CreationOptional<string>;
  declare ownerId: string;
  declare pseudonym: string;
  declare version: CreationOptional<number>;
  declare name: string;
  declare cellTypeId: string;
  declare parallel: number;
  declare series: number;
  declare firstUseMonth: string;
  declare madeMonth: string | null;
  declare bought: BankFields['bought'];
  declare startCapacityAh: number | null;
  declare clamping: BankFields['clamping'];
  declare clampForceN: number | null;
  declare clampTorqueNm: number | null;
  declare spacingMm: number | null;
  declare place: BankFields['place'];
  declare climateBand: BankFields['climateBand'];
  declare chargeLimitV: number | null;
  declare dischargeLimitV: number | null;
  declare bmsHighTripV: number | null;
  declare bmsLowTripV: number | null;
  declare priceMinor: number | null;
  declare priceCurrency: string | null;
  declare priceMonth: string | null;
  declare sources: BankFields['sources'];
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
  declare cellType?: NonAttribute<CellType>;
  declare events?: NonAttribute<BankEvent[]>;
  declare reminder?: NonAttribute<Reminder | null>;
}

export class BankEvent extends Model<InferAttributes<BankEvent>, InferCreationAttributes<BankEvent>> {
  declare id: CreationOptional<string>;
  declare bankId: string;
  declare happenedOn: string;
  declare kind: BankEventKind;
  declare note: string;
  declare createdAt: CreationOptional<Date>;
}

/** What the owner chose about a bank's reminder; banks without a row follow their last check. */
export class Reminder extends Model<InferAttributes<Reminder>, InferCreationAttributes<Reminder>> {
  declare bankId: string;
  declare isOn: boolean;
  /** The owner's own date; null = a year after the last check. */
  declare dueOn: string | null;
  /** The last check when that date was set: with the next one the date has done its work. */
  declare setAfter: string | null;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
}

export function initBankModels(sequelize: Sequelize): void {
  Bank.init(
    {
      id: uuidKey(),
      ownerId: string(),
      pseudonym: string(),
      version: whole(1),
      name: string(),
      cellTypeId: string(),
      parallel: whole(),
      series: whole(),
      firstUseMonth: string(),
      madeMonth: optionalString(),
      bought: string(),
      startCapacityAh: optionalReal(),
      clamping: string(),
      clampForceN: optionalReal(),
      clampTorqueNm: optionalReal(),
      spacingMm: optionalReal(),
      place: optionalString(),
      climateBand: optionalString(),
      chargeLimitV: optionalReal(),
      dischargeLimitV: optionalReal(),
      bmsHighTripV: optionalReal(),
      bmsLowTripV: optionalReal(),
      priceMinor: optionalWhole(),
      priceCurrency: optionalString(),
      priceMonth: optionalString(),
      sources: json(),
      createdAt: instant(),
      updatedAt: instant(),
    },
    { sequelize, tableName: 'banks', modelName: 'Bank' },
  );
  BankEvent.init(
    {
      id: uuidKey(),
      bankId: string(),
      happenedOn: string(),
      kind: string(),
      note: longText(),
      createdAt: instant(),
    },
    { sequelize, tableName: 'bankEvents', modelName: 'BankEvent', updatedAt: false },
  );
  Reminder.init(
    {
      bankId: textKey(),
      isOn: yesNo(),
      dueOn: optionalString(),
      setAfter: optionalString(),
      createdAt: instant(),
      updatedAt: instant(),
    },
    { sequelize, tableName: 'reminders', modelName: 'Reminder' },
  );
}
