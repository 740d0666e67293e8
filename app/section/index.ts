/** Doors of the section. */
export { default as SectionPanel } from './SectionPanel.vue';
