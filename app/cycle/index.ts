/** Doors of the cycle: stages with their set-point, and what the faces meet, as tables of the sheet. */
export { default as CycleTable } from './CycleTable.vue';
export { default as ExposureTable } from './ExposureTable.vue';
