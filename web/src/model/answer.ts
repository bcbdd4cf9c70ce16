/** The answers of the core as the page reads them. Their one source is the JSON Schema, from which `generated/` is made. */
import type * as Contract from '../generated/contract';

export type {
  Assumed,
  BridgeStep,
  Carry,
  Client,
  CalendarResult,
  ComparisonResult,
  CurveResult,
  FuturesResult,
  HedgeCoverResult,
  IsoDate,
  LedgerRow,
  OnQuantity,
  PathResult,
  QuoteDates,
  QuoteResult,
  Remark,
  RateFan,
  RateLevels,
  Sensitivities,
  SimulatedPart,
  SimulatePartResult,
  SimulateWholeResult,
  TenorsResult,
  TenorsRow,
  WorkingStep,
} from '../generated/contract';

export type Side = 'bid' | 'offer';
export type Change = Contract.Sensitivity;
export type IncomeRow = Contract.IncomeLine;
export type LedgerSide = Contract.Ledger;
export type RandomBlock = Contract.RandomDiscount;

export interface TwoSides<T = number> {
  readonly bid: T;
  readonly offer: T;
}
