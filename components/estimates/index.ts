export { ChargeWindowEstimate } from './ChargeWindowEstimate';
export { DepthEstimate } from './DepthEstimate';
export { SpringEstimate, TorqueEstimate } from './ForceEstimates';
export { RateEstimate } from './RateEstimate';
export { TemperatureEstimate } from './TemperatureEstimate';
