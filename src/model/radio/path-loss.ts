/** Median path loss in dB, one function a model; each model is a file of its own. */
import { macro, micro } from "./path-loss/urban-38901";

export { loss as freeSpace } from "./path-loss/free-space";
export { loss as logDistance } from "./path-loss/log-distance";
export { loss as hata } from "./path-loss/hata";
export { loss as cost231 } from "./path-loss/cost231";
export { loss as rma } from "./path-loss/rural-38901";
export const uma = macro.loss;
export const umi = micro.loss;
