/** Door of the start: the first view. */
export { default as StartView } from './StartView.vue';
