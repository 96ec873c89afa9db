import { searched } from "../src/model/whatif/solve";
import { number, optionalNumber, perCell, rawRange, text, wholeTable } from "../src/sheet/call";
import { changeRange, sensitivityTable, solveFor, sweepTable } from "../src/sheet/what-if";

/**
 * Value of one parameter at which a function of this set reaches a target.
 * @customfunction WHATIF.SOLVE
 * @param functionName Name of the function, such as "ERLANGB.BLOCKING".
 * @param inputs Two columns: parameter name and value; a name on several rows gives the items of a range.
 * @param unknown Name of the parameter to solve for; its value in inputs, if any, is not used.
 * @param target Value that the function shall reach.
 * @param low Lowest value of the unknown to search.
 * @param high Highest value of the unknown to search.
 * @returns Value of the unknown.
 * @method Root search between low and high by inverse interpolation and bisection, to the last digits. A parameter that must be whole: the first whole number from low that reaches or passes the target. Of a function that gives several numbers the first counts; where it is flat at the target, or crosses it more than once, the answer is one of the places.
 * @source R. P. Brent, Algorithms for Minimization without Derivatives (1973), chapter 4.
 * @errors #N/A with both end values where the target does not lie between them, or where the function steps over it; errors of the function itself are passed on.
 * @example =CAP.WHATIF.SOLVE("ERLANGB.BLOCKING", {"channels",30}, "trafficE", 0.02, 1, 30) is 21.932
 */
export function whatifSolve(
  functionName: any[][],
  inputs: any[][],
  unknown: any[][],
  target: any[][],
  low: any[][],
  high: any[][],
): any[][] {
  return perCell(solveFor, {
    functionName: text(functionName),
    inputs: rawRange(inputs),
    unknown: text(unknown),
    target: number(target, searched),
    low: number(low, searched),
    high: number(high, searched),
  });
}

/**
 * Table of a function's answers over the values of one or two of its parameters.
 * @customfunction WHATIF.SWEEP
 * @param functionName Name of the function, such as "ERLANGB.BLOCKING".
 * @param inputs Two columns: parameter name and value; a name on several rows gives the items of a range.
 * @param varied Name of the parameter that varies down the table.
 * @param values Values of that parameter.
 * @param [varied2] Name of a second parameter, which varies to the right.
 * @param [values2] Values of the second parameter.
 * @returns Table with headings: a row for each value, a column for each value of the second parameter.
 * @method One call of the function for each value or pair of values; of several numbers the first counts. At most 2500 answers.
 * @source Common practice.
 * @errors An answer that the function refuses is an error in its own cell.
 * @example =CAP.WHATIF.SWEEP("ERLANGB.BLOCKING", {"channels",15}, "trafficE", {8;9;10}) is "trafficE"
 */
export function whatifSweep(
  functionName: any[][],
  inputs: any[][],
  varied: any[][],
  values: any[][],
  varied2?: any[][],
  values2?: any[][],
): any[][] {
  return wholeTable(sweepTable, {
    functionName: text(functionName),
    inputs: rawRange(inputs),
    varied: text(varied),
    values: rawRange(values),
    varied2: rawRange(varied2),
    values2: rawRange(values2),
  });
}

/**
 * What a small change of each input does to a function's answer, the strongest first.
 * @customfunction WHATIF.SENSITIVITY
 * @param functionName Name of the function, such as "ERLANGB.BLOCKING".
 * @param inputs Two columns: parameter name and value; a name on several rows gives the items of a range.
 * @param [change] Share by which each input is changed, above 0 and below 1; 0.1 by default.
 * @returns Table: parameter, result at the lower and at the higher value, elasticity.
 * @method One input at a time, value (1 - change) and value (1 + change); inputs that are whole numbers and must be move to the next whole number beyond. Elasticity = relative change of the answer between both sides over that of the input (of one side where the other has no answer). Texts, zeros and ranges of several items stay as they are. A decibel value changes by a share of its number, not of its ratio.
 * @source Common practice: local one-at-a-time sensitivity.
 * @assumes Inputs change independently; optional parameters left out of inputs are not varied.
 * @errors An answer that the function refuses is an error in its own cell.
 * @example =CAP.WHATIF.SENSITIVITY("ERLANGB.BLOCKING", {"trafficE",10;"channels",15}) is "parameter"
 */
export function whatifSensitivity(functionName: any[][], inputs: any[][], change?: any[][]): any[][] {
  return wholeTable(sensitivityTable, {
    functionName: text(functionName),
    inputs: rawRange(inputs),
    change: optionalNumber(change, changeRange, 0.1),
  });
}
