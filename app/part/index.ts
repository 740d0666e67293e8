/** Doors of the part: its layers, materials and probes as tables of the sheet. */
export { default as MaterialsTable } from './MaterialsTable.vue';
export { default as PartTable } from './PartTable.vue';
export { default as ProbesTable } from './ProbesTable.vue';
