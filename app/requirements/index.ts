/** Doors of the requirements: a table of the sheet. */
export { default as RequirementsTable } from './RequirementsTable.vue';
