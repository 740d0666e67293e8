/** Doors of the widgets that features share, and of the words they share. */
export { default as Banner } from './Banner.vue';
export { default as Dialog } from './Dialog.vue';
export { default as EditableTable } from './grid/EditableTable.vue';
export { default as Icon, type IconName } from './Icon.vue';
export { default as Mark } from './Mark.vue';
export { default as QuantityField } from './QuantityField.vue';
export { default as Segmented } from './Segmented.vue';
export { default as SelectField } from './SelectField.vue';
export { default as SheetSection } from './SheetSection.vue';
export { default as Sign } from './Sign.vue';
export { default as TextField } from './TextField.vue';
export { type Cell, type Column, type Row } from './grid/cells';
export { default as TableField } from './TableField.vue';
export {
  CORRELATION_WORDS,
  curveInWords,
  expressionRefusal,
  readTable,
  tableInWords,
  tableText,
  type TableLimits,
} from './curveWords';
export { problemInUnits } from './problemInUnits';
export { type QuantitySpec } from './readEntered';
export { tintNumber, tintOf } from './tint';
export {
  countOf,
  countsInWords,
  depthInWords,
  differenceInWords,
  layerName,
  limitKind,
  limitSign,
  marginInWords,
  orKind,
  placeInWords,
  requirementInWords,
  requirementParts,
  stageName,
  subjectInWords,
  temperatureInWords,
  VERDICT_SIGNS,
  VERDICT_WORDS,
  verdictNow,
  whereInWords,
  type RequirementWords,
  type SignKind,
  type VerdictView,
} from './words';
export { default as ChartMenu } from './ChartMenu.vue';
export { default as ChartTwin } from './ChartTwin.vue';
export { default as DragHandle } from './DragHandle.vue';
export { useHold, type Hold } from './useHold';
export { useSize } from './useSize';
export { moveTo, showIf, writeAttribute, writeText } from './live';
