export { CardElement } from './card.ts';
export { type EventRow, eventRows, settingText, showerNotation } from './event-rows.ts';
export { type MomentumRow, type MomentumTable, momentumTable } from './momentum-rows.ts';
export { rerunCommand } from './rerun-command.ts';
export { type StepRow, type StepRows, stepRows, TOLERANCE, unitOfT, valuesDiffer } from './step-rows.ts';
