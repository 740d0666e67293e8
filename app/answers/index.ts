/** Door of the answers: the strip at the top. */
export { default as AnswersStrip } from './AnswersStrip.vue';
