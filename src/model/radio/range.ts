/** Distance in km at which a path-loss model reaches a loss: the inverses of path-loss.ts, name by name. */
import { macro, micro } from "./path-loss/urban-38901";

export { range as freeSpace } from "./path-loss/free-space";
export { range as logDistance } from "./path-loss/log-distance";
export { range as hata } from "./path-loss/hata";
export { range as cost231 } from "./path-loss/cost231";
export { range as rma } from "./path-loss/rural-38901";
export const uma = macro.range;
export const umi = micro.range;
