export * from './calendar/iso';
export * from './calendar/month';
export * from './calendar/trade-day';
