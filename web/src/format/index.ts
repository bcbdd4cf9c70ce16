/** Numbers and dates as the person reads them. Reading what the person types is the business of `input/`. */
export * from './dates';
export * from './numbers';
