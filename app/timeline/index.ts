/** Doors of the timeline. */
export { default as TimelinePanel } from './TimelinePanel.vue';
