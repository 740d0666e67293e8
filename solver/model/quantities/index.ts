/**
 * Doors of quantities: reading what a person typed, writing what was computed, and the units in between.
 *
 * A door of its own because it loads mathjs's units: the solver, which only needs numbers, does not come through it.
 */
export { displayUnit, fromDisplay, toDisplay, type QuantityKind, type UnitSystem } from './kinds';
export { MAX_TYPED, readQuantity, type QuantityReading } from './read';
export { formatDuration, formatNumber, formatQuantity, type DurationStyle, type NumberStyle, type Written } from './write';
