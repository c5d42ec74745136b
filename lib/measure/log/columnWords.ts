import type { LogQuantity } from './logTypes';

/** What a column's name says of it. `confidence` runs from 0 to 1: name and unit, name alone, unit alone. */
export interface ColumnGuess {
  quantity: LogQuantity | null;
  unit: string | null;
  confidence: number;
}

// Spellings of units met in headers, lower case, to ours.
const unitWords: Record<string, string> = {
  v: 'V',
  volt: 'V',
  volts: 'V',
  mv: 'mV',
  millivolts: 'mV',
  a: 'A',
  amp: 'A',
  amps: 'A',
  ampere: 'A',
  amperes: 'A',
  ma: 'mA',
  milliamps: 'mA',
  w: 'W',
  watt: 'W',
  watts: 'W',
  kw: 'kW',
  '°c': '°C',
  degc: '°C',
  'deg c': '°C',
  c: '°C',
  celsius: '°C',
  '°f': '°F',
  degf: '°F',
  'deg f': '°F',
  f: '°F',
  fahrenheit: '°F',
  k: 'K',
  kelvin: 'K',
  s: 's',
  sec: 's',
  secs: 's',
  second: 's',
  seconds: 's',
  sek: 's',
  sekunden: 's',
  ms: 'ms',
  msec: 'ms',
  millis: 'ms',
  milliseconds: 'ms',
  min: 'min',
  mins: 'min',
  minute: 'min',
  minutes: 'min',
  h: 'h',
  hr: 'h',
  hrs: 'h',
  hour: 'h',
  hours: 'h',
  ah: 'Ah',
  mah: 'mAh',
  wh: 'Wh',
  kwh: 'kWh',
};

const unitKinds: Record<string, LogQuantity> = {
  V: 'voltage',
  mV: 'voltage',
  A: 'current',
  mA: 'current',
  W: 'power',
  kW: 'power',
  '°C': 'temperature',
  '°F': 'temperature',
  K: 'temperature',
  s: 'time',
  ms: 'time',
  min: 'time',
  h: 'time',
  Ah: 'counter',
  mAh: 'counter',
};

/** Our unit for a spelling, or null. Looked up as an own key, since names come from strangers' files. */
export function unitOfWord(word: string): string | null {
  const key = word.trim().replace(/^â°/i, '°').replace(/^[º˚]/, '°').replace(/\.$/, '').toLowerCase();
  return Object.hasOwn(unitWords, key) ? (unitWords[key] ?? null) : null;
}

/** The kind of quantity a unit of ours measures in a log, or null. */
export function quantityOfUnit(unit: string): LogQuantity | null {
  return Object.hasOwn(unitKinds, unit) ? (unitKinds[unit] ?? null) : null;
}

/** The unit inside a header such as "Current (mA)", "Strom / A", "V_pack_mV" or "Temp in °C". */
export function unitOfHeader(name: string): string | null {
  const bracketed = /[([{<]\s*([^)\]}>]{1,14}?)\s*[)\]}>]\s*$/.exec(name);
  if (bracketed?.[1]) return unitOfWord(bracketed[1]);
  const lastWord = /(?:[\s_/,:;-]|\bin\s)+([^\s_/,:;-]{1,14})$/i.exec(name);
  // "Cell min" is the lowest cell, no count of minutes.
  if (!lastWord?.[1] || lastWord.index === 0 || /^min$/i.test(lastWord[1])) return null;
  return unitOfWord(lastWord[1]);
}

const lowWords = /\b(min|minimum|lowest|low|weakest|niedrigste|kleinste|plus basse|mini|minima)\b/;
const highWords =
  /\b(max|maximum|highest|high|strongest|hochste|hoechste|grosste|groesste|plus haute|maxi|maxima)\b/;
const cellWords = /\b(v ?cells?|cells?|zellen?|zellspannung|cellules?|celdas?|cella|celle)\b/;
const cellNumber =
  /^(?:v ?cell|cell|zelle|cellule|celda|cella|cv?|v)\s*(?:v(?:oltage)?\s*)?#?\d{1,2}(?:\s*m?v(?:oltage)?)?$/;

// Names in English, German, French, Spanish and Italian, without accents.
const nameRules: [RegExp, LogQuantity][] = [
  [/\b(temp|temperature?|temperatur|temperatura|t ?cells?|ntc)\b/, 'temperature'],
  [/\b(power|leistung|puissance|potencia|potenza|watts?)\b|^p$/, 'power'],
  [
    /\b(current|strom|courant|intensite|corriente|corrente|amps?|ampere|i (?:batt?|pack|dc))\b|^i$/,
    'current',
  ],
  [/\b(voltage|volts?|\w*spannung|tension|tensione|[vu] ?(?:batt?|pack|dc))\b|^[uv]$/, 'voltage'],
  [
    /\b(time|timestamp|date|datum|fecha|data|zeit|uhrzeit|zeitstempel|laufzeit|heure|temps|hora|tiempo|ora|tempo)\b/,
    'time',
  ],
  [/\b(datetime|elapsed|duration|clock|epoch|unix)\b|^t$/, 'time'],
  [/\b(m?ah|capacity|kapazitat|capacite|capacidad|capacita|consumed|discharged)\b/, 'counter'],
];

/** Guesses what a column holds from its name, and from a unit that stands in a row of its own. */
export function guessColumn(name: string, unitRow: string | null): ColumnGuess {
  const unit = unitOfHeader(name) ?? unitRow ?? unitOfWord(name);
  const ofUnit = unit ? quantityOfUnit(unit) : null;
  // A share, or a unit that no column of ours has (an energy), is something else.
  if (name.includes('%') || (unit !== null && ofUnit === null))
    return { quantity: null, unit, confidence: 0 };
  const named = quantityOfName(wordsOf(name), ofUnit);
  if (named) return { quantity: named, unit, confidence: unit ? 1 : 0.8 };
  return ofUnit ? { quantity: ofUnit, unit, confidence: 0.5 } : { quantity: null, unit, confidence: 0 };
}

/** A name as plain lower case words: units in brackets gone, underscores and camel case parted, accents dropped. */
const wordsOf = (name: string) =>
  name
    .replace(/[([{<][^)\]}>]*[)\]}>]/g, ' ')
    .normalize('NFD')
    .replace(/[\u0300-\u036f]/g, '')
    .replace(/ß/g, 'ss')
    .replace(/([a-z])([A-Z])/g, '$1 $2')
    .replace(/[_\-./:,]+/g, ' ')
    .replace(/\s+/g, ' ')
    .trim()
    .toLowerCase();

const quantityOfName = (words: string, ofUnit: LogQuantity | null): LogQuantity | null => {
  if (ofUnit === null || ofUnit === 'voltage') {
    if (cellNumber.test(words)) return 'cell';
    if (cellWords.test(words) && lowWords.test(words)) return 'lowestCell';
    if (cellWords.test(words) && highWords.test(words)) return 'highestCell';
  }
  return (
    nameRules.find(([pattern, quantity]) => pattern.test(words) && (ofUnit ?? quantity) === quantity)?.[1] ??
    null
  );
};
