/** Doors of exchange: what a surface exchanges with its surroundings, by its own temperature. */
export { courseInside, timeSlope, type CourseInside } from './courseInside';
export { Exchange } from './exchange';
