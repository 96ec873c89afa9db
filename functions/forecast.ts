import { nonNegative, positive, probability } from "../src/model/domain";
import { exhaustion } from "../src/model/traffic/exhaustion";
import { confidenceRange, fit, FIT_MODELS } from "../src/model/traffic/fit";
import * as forecast from "../src/model/traffic/forecast";
import { choice, flag, number, optionalNumber, parallel, perCell, perCellRow } from "../src/sheet/call";

/**
 * Level after years of constant growth.
 * @customfunction FORECAST.COMPOUND
 * @param start Level at the start.
 * @param growthPerYear Growth a year as a fraction, above -1.
 * @param years Years since the start; negative looks back.
 * @returns Level, in the unit of the start.
 * @method start (1 + g)^t.
 * @source ITU-T Recommendation E.507 (exponential growth curve).
 * @assumes The same relative growth every year.
 * @example =CAP.FORECAST.COMPOUND(50000, 0.05, 4) is 60775
 */
export function forecastCompound(start: any[][], growthPerYear: any[][], years: any[][]): any[][] {
  return perCell(forecast.compound, {
    start: number(start, forecast.level),
    growthPerYear: number(growthPerYear, forecast.growth),
    years: number(years, forecast.time),
  });
}

/**
 * Logistic growth to a saturation, symmetric about its midpoint.
 * @customfunction FORECAST.LOGISTIC
 * @param saturation Level in the long run.
 * @param midpoint Time at which half of the saturation is reached.
 * @param steepness Rate of growth far below saturation, per unit of time, above 0.
 * @param time Time of the forecast, on the same clock as the midpoint.
 * @returns Level, in the unit of the saturation.
 * @method S / (1 + exp(-k (t - m))).
 * @source ITU-T Recommendation E.507 (logistic growth curve).
 * @assumes Growth in proportion to the level and to what is left to saturation.
 * @example =CAP.FORECAST.LOGISTIC(1000, 2030, 0.7, 2027) is 109.1
 */
export function forecastLogistic(saturation: any[][], midpoint: any[][], steepness: any[][], time: any[][]): any[][] {
  return perCell(forecast.logistic, {
    saturation: number(saturation, forecast.level),
    midpoint: number(midpoint, forecast.time),
    steepness: number(steepness, forecast.rate),
    time: number(time, forecast.time),
  });
}

/**
 * Gompertz growth to a saturation: quick at first, slow at the end.
 * @customfunction FORECAST.GOMPERTZ
 * @param saturation Level in the long run.
 * @param displacement How far the start lies below saturation: the level at time 0 is S exp(-displacement). Above 0.
 * @param rate Rate at which the gap in logarithms closes, per unit of time, above 0.
 * @param time Time of the forecast.
 * @returns Level, in the unit of the saturation.
 * @method S exp(-b exp(-c t)): the exponential form, not S b^(c^t).
 * @source ITU-T Recommendation E.507 (Gompertz growth curve).
 * @assumes Time counted from the start of the series, not a calendar year.
 * @example =CAP.FORECAST.GOMPERTZ(1000, 5, 0.3, 5) is 327.7
 */
export function forecastGompertz(saturation: any[][], displacement: any[][], rate: any[][], time: any[][]): any[][] {
  return perCell(forecast.gompertz, {
    saturation: number(saturation, forecast.level),
    displacement: number(displacement, positive),
    rate: number(rate, forecast.rate),
    time: number(time, forecast.time),
  });
}

/**
 * Adopters of a new service so far, by innovation and imitation.
 * @customfunction FORECAST.BASS
 * @param market Adopters in the long run.
 * @param innovation Coefficient of innovation p per year, above 0.
 * @param imitation Coefficient of imitation q per year, at least 0.
 * @param time Years since launch, at least 0.
 * @returns Cumulative adopters, in the unit of the market.
 * @method M (1 - exp(-(p + q) t)) / (1 + (q/p) exp(-(p + q) t)); p and q per year, time from the launch.
 * @source F. M. Bass, A New Product Growth for Model Consumer Durables, Management Science 15 (1969).
 * @assumes A fixed market, each adopts once.
 * @example =CAP.FORECAST.BASS(1000, 0.03, 0.38, 5) is 331.2
 */
export function forecastBass(market: any[][], innovation: any[][], imitation: any[][], time: any[][]): any[][] {
  return perCell(forecast.bass, {
    market: number(market, forecast.level),
    innovation: number(innovation, forecast.rate),
    imitation: number(imitation, nonNegative),
    time: number(time, forecast.horizon),
  });
}

/**
 * Forecast of a series by a fitted curve, with a prediction band.
 * @customfunction FORECAST.FIT
 * @param times Times of the observations; years since launch for "bass".
 * @param observed Observed levels, one for each time.
 * @param model "linear", "compound", "logistic", "gompertz" or "bass".
 * @param targetTimes Times to forecast.
 * @param [confidence] Probability of the band, above 0 to 0.9999; 0.8 by default.
 * @param [labels] TRUE to put the headings first.
 * @returns Level, low and high for each target time.
 * @method Least squares of the levels, of their logarithms for "compound". Saturating curves: saturation by linear least squares over a plane of starting values, then Levenberg-Marquardt in all parameters. Band of one future observation: level -+ t s sqrt(1 + h), t Student's with n - p degrees of freedom, s the residual deviation, h = g^T (J^T J)^-1 g by the delta method (exact for "linear"; in logarithms for "compound"). Nothing below 0 is forecast.
 * @source ITU-T Recommendation E.507 (growth curves, regression); J. More 1978 (Levenberg-Marquardt); N. Draper, H. Smith, Applied Regression Analysis (bands).
 * @assumes Independent errors of equal size (of equal relative size for "compound"), and that the curve goes on to hold: the band does not cover a wrong curve.
 * @errors #N/A where the observations do not support the curve: too few, no bend that a straight line lacks, or a saturation or rate whose standard error is over half of it. At most 1000 observations.
 * @example =CAP.FORECAST.FIT({0;1;2;3;4}, {100;112;125;141;158}, "compound", 7) is 222.57
 */
export function forecastFit(
  times: any[][],
  observed: any[][],
  model: any[][],
  targetTimes: any[][],
  confidence?: any[][],
  labels?: any[][],
): any[][] {
  return perCellRow(
    fit,
    ["level", "low", "high"],
    {
      times: parallel(times, forecast.time),
      observed: parallel(observed, forecast.level),
      model: choice(model, FIT_MODELS),
      targetTimes: number(targetTimes, forecast.time),
      confidence: optionalNumber(confidence, confidenceRange, 0.8),
    },
    flag(labels),
  );
}

/**
 * Time at which a forecast demand first exceeds a capacity.
 * @customfunction FORECAST.EXHAUSTION
 * @param times Times of the forecast, in any order.
 * @param demand Demand at each time.
 * @param capacity Capacity in the unit of the demand.
 * @returns Time, in the unit of the times; the first one where the demand exceeds the capacity at once.
 * @method First crossing from at most the capacity to above it, linear between the given times.
 * @source Common practice.
 * @errors #N/A where the demand never exceeds the capacity; #VALUE! for the same time twice.
 * @example =CAP.FORECAST.EXHAUSTION({2027;2028;2029}, {40;52;70}, 58) is 2028.33
 */
export function forecastExhaustion(times: any[][], demand: any[][], capacity: any[][]): any[][] {
  return perCell(exhaustion, {
    times: parallel(times, forecast.time),
    demand: parallel(demand, forecast.level),
    capacity: number(capacity, forecast.level),
  });
}

/**
 * Level of a forecast at a percentile, its error growing with the horizon.
 * @customfunction FORECAST.BAND
 * @param level Forecast level: the median.
 * @param errorPerYear Relative error of a forecast one year ahead, at least 0.
 * @param years Years ahead, at least 0.
 * @param percentile Probability that the level is not exceeded, above 0 and below 1.
 * @returns Level, in the unit of the forecast.
 * @method level exp(z ln(1 + e) sqrt(years)), z the standard normal quantile of the percentile.
 * @source Common practice: lognormal error, independent from year to year.
 * @assumes Errors of the years add up like a random walk of the logarithm.
 * @example =CAP.FORECAST.BAND(1000, 0.1, 4, 0.9) is 1276.7
 */
export function forecastBand(level: any[][], errorPerYear: any[][], years: any[][], percentile: any[][]): any[][] {
  return perCell(forecast.band, {
    level: number(level, forecast.level),
    errorPerYear: number(errorPerYear, nonNegative),
    years: number(years, forecast.horizon),
    percentile: number(percentile, probability),
  });
}
