/** Requests of the contract as the page writes them. Their one source is the JSON Schema, from which `generated/` is made. */
import type * as Contract from '../generated/contract';

export type { AssetKind, Compounding, Curve, Market, Rate } from '../generated/contract';
export type Funding = Contract.FundingCurve;
export type Model = Contract.RandomCurve;
export type Pillars = Contract.PillarCurve;
export type SimulateRequest = Contract.SimulateRequest;
export type MarginUnit = NonNullable<Contract.Margin['unit']>;

/** The page always says who asks and for how much. */
export type QuoteRequest = Contract.QuoteRequest & {
  readonly inquiry: Contract.Inquiry & { readonly client: Contract.Client; readonly quantity: number };
};
