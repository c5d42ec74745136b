// All charts in one part of the bundle: split further, the drawing library they share would be loaded with every page.
export { BandLineChart } from './BandLineChart';
export { BinChart } from './BinChart';
export { CompareChart } from './CompareChart';
export { FadeChart } from './FadeChart';
export { GrowthChart } from './GrowthChart';
export { HistoryChart } from './HistoryChart';
export { LogChart } from './LogChart';
export { SurvivalChart } from './SurvivalChart';
