/** Rates of a link, and what a cell makes of them. */
export {
  attenuated,
  attenuationFactor,
  DEFAULT_ATTENUATION,
  DEFAULT_MAXIMUM_BPS_HZ,
  DEFAULT_MINIMUM_DB,
  maximumEfficiency,
  requiredSinr,
  shannon,
} from "./link-curve";
export { CELL_CAPACITY_COLUMNS, cellCapacity, cellEfficiency, shadowingDeviation } from "./cell-efficiency";
export { latticeCluster } from "./local-sinr";
