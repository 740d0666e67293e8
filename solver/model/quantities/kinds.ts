/**
 * The kinds of quantity that a person types or reads, and the units each is shown in.
 *
 * A temperature and a temperature difference are two kinds: only the first has an offset.
 */

export type QuantityKind =
  | 'length'
  | 'temperature'
  | 'temperatureDifference'
  | 'time'
  | 'conductivity'
  | 'density'
  | 'heatCapacity'
  | 'filmCoefficient'
  | 'heatFlux'
  | 'contactResistance'
  | 'temperatureRate'
  | 'latentHeat'
  | 'volumetricHeat'
  | 'velocity'
  | 'fraction';

/** Which units numbers are shown in, and what a bare number means. */
export type UnitSystem = 'SI' | 'US';

export interface Unit {
  /** As shown after a number. */
  text: string;
  /** Size of the unit in the stored unit (SI base units; °C for a temperature). */
  factor: number;
  /** Stored value at a reading of zero; only temperatures have one. */
  offset?: number;
  /** Other ways to write it. */
  spellings?: readonly string[];
}

export interface Kind {
  /** With its article, for messages. */
  noun: string;
  /** The units shown, by unit system: they stand in `units`. */
  display: Record<UnitSystem, string>;
  example: Record<UnitSystem, string>;
  units: readonly Unit[];
  /** The stored unit for the unit parser, where units of this kind can be put together from others. */
  stored?: string;
}

const INCH = 0.0254; // m, exact
const FOOT = 12 * INCH;
const POUND = 0.45359237; // kg, exact
const BTU = 1055.05585262; // J, International Table, exact
const KILOCALORIE = 4186.8; // J, International Table, exact
const FAHRENHEIT_DEGREE = 5 / 9; // K
const HOUR = 3600; // s
const ZERO_C = 273.15; // K

export const KINDS: Readonly<Record<QuantityKind, Kind>> = {
  length: {
    noun: 'a length',
    display: { SI: 'mm', US: 'in' },
    example: { SI: '25 mm', US: '1 in' },
    units: [
      { text: 'mm', factor: 1e-3, spellings: ['millimetre', 'millimetres', 'millimeter', 'millimeters'] },
      { text: 'cm', factor: 1e-2, spellings: ['centimetre', 'centimetres', 'centimeter', 'centimeters'] },
      { text: 'm', factor: 1, spellings: ['metre', 'metres', 'meter', 'meters'] },
      { text: 'in', factor: INCH, spellings: ['inch', 'inches', '"'] },
      { text: 'ft', factor: FOOT, spellings: ['foot', 'feet', "'"] },
      { text: 'µm', factor: 1e-6, spellings: ['um', 'micron', 'microns', 'micrometre', 'micrometer'] },
      { text: 'mil', factor: 1e-3 * INCH, spellings: ['mils', 'thou'] },
    ],
    stored: 'm',
  },
  temperature: {
    noun: 'a temperature',
    display: { SI: '°C', US: '°F' },
    example: { SI: '540 °C', US: '1000 °F' },
    units: [
      { text: '°C', factor: 1, offset: 0, spellings: ['C', 'celsius'] },
      { text: '°F', factor: FAHRENHEIT_DEGREE, offset: -32 * FAHRENHEIT_DEGREE, spellings: ['F', 'fahrenheit'] },
      { text: 'K', factor: 1, offset: -ZERO_C, spellings: ['°K', 'kelvin', 'kelvins'] },
      { text: '°R', factor: FAHRENHEIT_DEGREE, offset: -ZERO_C, spellings: ['R', 'rankine'] },
    ],
  },
  temperatureDifference: {
    noun: 'a temperature difference',
    display: { SI: 'K', US: 'F°' },
    example: { SI: '20 K', US: '36 F°' },
    units: [
      { text: 'K', factor: 1, spellings: ['C°', '°C', 'C', '°K', 'K°', 'kelvin', 'kelvins', 'celsius'] },
      { text: 'F°', factor: FAHRENHEIT_DEGREE, spellings: ['°F', 'F', '°R', 'R', 'R°', 'fahrenheit', 'rankine'] },
    ],
    stored: 'K',
  },
  time: {
    noun: 'a time',
    display: { SI: 'h', US: 'h' },
    example: { SI: '8 h', US: '8 h' },
    units: [
      { text: 'h', factor: HOUR, spellings: ['hr', 'hrs', 'hour', 'hours'] },
      { text: 'min', factor: 60, spellings: ['m', 'mins', 'minute', 'minutes'] },
      { text: 's', factor: 1, spellings: ['sec', 'secs', 'second', 'seconds'] },
      { text: 'd', factor: 24 * HOUR, spellings: ['day', 'days'] },
    ],
    stored: 's',
  },
  conductivity: {
    noun: 'a conductivity',
    display: { SI: 'W/m·K', US: 'BTU/h·ft·°F' },
    example: { SI: '1.5 W/(m·K)', US: '0.9 BTU/(h·ft·°F)' },
    units: [
      { text: 'W/m·K', factor: 1 },
      { text: 'BTU/h·ft·°F', factor: BTU / (HOUR * FOOT * FAHRENHEIT_DEGREE) },
      { text: 'BTU·in/h·ft²·°F', factor: (BTU * INCH) / (HOUR * FOOT ** 2 * FAHRENHEIT_DEGREE) },
      { text: 'kcal/m·h·K', factor: KILOCALORIE / HOUR },
    ],
    stored: 'W/(m*K)',
  },
  density: {
    noun: 'a density',
    display: { SI: 'kg/m³', US: 'lb/ft³' },
    example: { SI: '2600 kg/m³', US: '160 lb/ft³' },
    units: [
      { text: 'kg/m³', factor: 1 },
      { text: 'lb/ft³', factor: POUND / FOOT ** 3, spellings: ['pcf'] },
      { text: 'g/cm³', factor: 1000, spellings: ['g/cc'] },
    ],
    stored: 'kg/m^3',
  },
  heatCapacity: {
    noun: 'a heat capacity',
    display: { SI: 'J/kg·K', US: 'BTU/lb·°F' },
    example: { SI: '1000 J/(kg·K)', US: '0.24 BTU/(lb·°F)' },
    units: [
      { text: 'J/kg·K', factor: 1 },
      { text: 'kJ/kg·K', factor: 1000 },
      { text: 'BTU/lb·°F', factor: BTU / (POUND * FAHRENHEIT_DEGREE) },
      { text: 'kcal/kg·K', factor: KILOCALORIE },
    ],
    stored: 'J/(kg*K)',
  },
  latentHeat: {
    noun: 'a heat per mass',
    display: { SI: 'kJ/kg', US: 'BTU/lb' },
    example: { SI: '334 kJ/kg', US: '144 BTU/lb' },
    units: [
      { text: 'kJ/kg', factor: 1000 },
      { text: 'J/kg', factor: 1 },
      { text: 'BTU/lb', factor: BTU / POUND },
      { text: 'kcal/kg', factor: KILOCALORIE },
    ],
    stored: 'J/kg',
  },
  volumetricHeat: {
    noun: 'a heat source',
    display: { SI: 'kW/m³', US: 'BTU/h·ft³' },
    example: { SI: '5 kW/m³', US: '480 BTU/(h·ft³)' },
    units: [
      { text: 'kW/m³', factor: 1000 },
      { text: 'W/m³', factor: 1 },
      { text: 'MW/m³', factor: 1e6 },
      { text: 'BTU/h·ft³', factor: BTU / (HOUR * FOOT ** 3) },
    ],
    stored: 'W/m^3',
  },
  velocity: {
    noun: 'a velocity',
    display: { SI: 'm/s', US: 'ft/s' },
    example: { SI: '2 m/s', US: '6.5 ft/s' },
    units: [
      { text: 'm/s', factor: 1 },
      { text: 'ft/s', factor: FOOT },
      { text: 'km/h', factor: 1000 / HOUR },
      { text: 'ft/min', factor: FOOT / 60 },
    ],
    stored: 'm/s',
  },
  filmCoefficient: {
    noun: 'a film coefficient',
    display: { SI: 'W/m²·K', US: 'BTU/h·ft²·°F' },
    example: { SI: '25 W/(m²·K)', US: '4 BTU/(h·ft²·°F)' },
    units: [
      { text: 'W/m²·K', factor: 1 },
      { text: 'kW/m²·K', factor: 1000 },
      { text: 'BTU/h·ft²·°F', factor: BTU / (HOUR * FOOT ** 2 * FAHRENHEIT_DEGREE) },
      { text: 'kcal/m²·h·K', factor: KILOCALORIE / HOUR },
    ],
    stored: 'W/(m^2*K)',
  },
  heatFlux: {
    noun: 'a heat flux',
    display: { SI: 'kW/m²', US: 'BTU/h·ft²' },
    example: { SI: '2.5 kW/m²', US: '800 BTU/(h·ft²)' },
    units: [
      { text: 'kW/m²', factor: 1000 },
      { text: 'W/m²', factor: 1 },
      { text: 'MW/m²', factor: 1e6 },
      { text: 'BTU/h·ft²', factor: BTU / (HOUR * FOOT ** 2) },
    ],
    stored: 'W/m^2',
  },
  contactResistance: {
    noun: 'a contact resistance',
    display: { SI: 'm²·K/W', US: 'h·ft²·°F/BTU' },
    example: { SI: '0.004 m²·K/W', US: '0.02 h·ft²·°F/BTU' },
    units: [
      { text: 'm²·K/W', factor: 1 },
      { text: 'h·ft²·°F/BTU', factor: (HOUR * FOOT ** 2 * FAHRENHEIT_DEGREE) / BTU },
    ],
    stored: 'm^2*K/W',
  },
  temperatureRate: {
    noun: 'a rate of temperature',
    display: { SI: 'K/h', US: 'F°/h' },
    example: { SI: '25 K/h', US: '45 F°/h' },
    units: [
      { text: 'K/h', factor: 1 / HOUR },
      { text: 'K/min', factor: 1 / 60 },
      { text: 'K/s', factor: 1 },
      { text: 'F°/h', factor: FAHRENHEIT_DEGREE / HOUR },
      { text: 'F°/min', factor: FAHRENHEIT_DEGREE / 60 },
    ],
    stored: 'K/s',
  },
  fraction: {
    noun: 'a fraction',
    display: { SI: '', US: '' },
    example: { SI: '0.5', US: '0.5' },
    units: [
      { text: '', factor: 1 },
      { text: '%', factor: 0.01, spellings: ['percent', 'pct'] },
    ],
  },
};

/** The unit that a kind is shown in: "mm", "°F"; empty for a fraction. */
export const displayUnit = (kind: QuantityKind, system: UnitSystem): string => KINDS[kind].display[system];

/** The unit that a kind is shown in, with its size. */
export function shownUnit(kind: QuantityKind, system: UnitSystem): Unit {
  const { units, display } = KINDS[kind];
  const unit = units.find(({ text }) => text === display[system]);
  if (unit === undefined) throw new RangeError(`${kind} has no unit "${display[system]}"`);
  return unit;
}

/** The one place where a temperature's offset is applied: a reading in `unit` as a stored value. */
export const storedValue = (reading: number, unit: Unit): number => reading * unit.factor + (unit.offset ?? 0);

/** A stored value (SI base units, °C) as a number in the display unit. */
export function toDisplay(value: number, kind: QuantityKind, system: UnitSystem): number {
  const unit = shownUnit(kind, system);
  return (value - (unit.offset ?? 0)) / unit.factor;
}

/** A number in the display unit as a stored value (SI base units, °C). */
export const fromDisplay = (reading: number, kind: QuantityKind, system: UnitSystem): number =>
  storedValue(reading, shownUnit(kind, system));
