import * as erlangB from "../src/model/blocking/erlang-b";
import { count, domain, nonNegative, positive, probability } from "../src/model/domain";
import { carriers, channelsOfCarrier } from "../src/model/plan/carriers";
import { sites } from "../src/model/plan/sites";
import { GROUPINGS } from "../src/model/plan/summary";
import { radius, sectorsOfArea } from "../src/model/radio/cell";
import { amount } from "../src/model/traffic/traffic";
import { flag, number, optionalChoice, optionalNumber, perCell, perCellRow, rawRange } from "../src/sheet/call";
import { longTable } from "../src/sheet/long-table";
import { changeCells, demandCells, expansionCells, planCells, summaryCells } from "../src/sheet/plan-tables";

/**
 * Smallest number of carriers that carries a traffic at a blocking target.
 * @customfunction PLAN.CARRIERS
 * @param trafficE Offered traffic in erlang, at least 0.
 * @param blocking Blocking target, above 0 and below 1.
 * @param channelsPerCarrier Channels or slots of one carrier, a whole number of at least 1.
 * @param [controlChannels] Channels of the cell that carry control, whatever its carriers; 0 by default.
 * @returns Whole number of carriers; 0 without traffic.
 * @method Smallest n with Erlang B of n channelsPerCarrier - controlChannels channels at most the target.
 * @source A. K. Erlang 1917 (Erlang B); common practice.
 * @assumes Every call takes one channel; all carriers of the cell are one group.
 * @example =CAP.PLAN.CARRIERS(12, 0.02, 8, 1) is 3
 */
export function planCarriers(
  trafficE: any[][],
  blocking: any[][],
  channelsPerCarrier: any[][],
  controlChannels?: any[][],
): any[][] {
  return perCell(carriers, {
    trafficE: number(trafficE, erlangB.countableTraffic),
    blocking: number(blocking, erlangB.blockingTarget),
    channelsPerCarrier: number(channelsPerCarrier, channelsOfCarrier),
    controlChannels: optionalNumber(controlChannels, count, 0),
  });
}

/**
 * Sites that an area needs, and whether coverage or capacity decides.
 * @customfunction PLAN.SITES
 * @param areaKm2 Area in km2, above 0.
 * @param radiusKm Reach of a site or sector in km, above 0.
 * @param trafficE Offered traffic of the area in erlang, at least 0.
 * @param trafficPerSiteE Traffic that one site carries at its target in erlang, above 0.
 * @param [sectors] Sectors of a site: 1, 2, 3 or 6; 1 by default.
 * @param [labels] TRUE to put the headings first.
 * @returns Whole number of sites, then "coverage" or "capacity".
 * @method The larger of CAP.CELL.SITES and traffic over traffic per site, rounded up; "coverage" where both are equal.
 * @source Common practice.
 * @assumes Traffic is even over the area; sites form a regular network.
 * @example =CAP.PLAN.SITES(500, 4, 300, 12, 3) is 25
 */
export function planSites(
  areaKm2: any[][],
  radiusKm: any[][],
  trafficE: any[][],
  trafficPerSiteE: any[][],
  sectors?: any[][],
  labels?: any[][],
): any[][] {
  return perCellRow(
    sites,
    ["sites", "decidedBy"],
    {
      areaKm2: number(areaKm2, positive),
      radiusKm: number(radiusKm, radius),
      trafficE: number(trafficE, amount),
      trafficPerSiteE: number(trafficPerSiteE, positive),
      sectors: optionalNumber(sectors, sectorsOfArea, 1),
    },
    flag(labels),
  );
}

/**
 * Traffic of every service in every area and year from a forecast of users.
 * @customfunction PLAN.DEMAND
 * @param demand Table Demand with its headings: area, year, users, errorPerYear.
 * @param services Table Services with its headings: service, kind, userShare and what the kind needs.
 * @returns Table with headings: area, year, service, trafficE, downMbps, upMbps.
 * @method Busy hour of the network: users userShare coincidence, times calls h / 3600 for a call (and sitesPerCall for a group call, which holds a channel at every site it occupies), times MB 8 busyHourShare / 3600 for data, times messages bytes 8 / 3600 both ways for a message. A row of a service with a year goes before the row without.
 * @source ITU-T Recommendation E.600 (traffic intensity); common practice.
 * @assumes Each user of a service behaves like the mean one.
 * @errors #VALUE! names table, row and column of the first wrong cell; a heading that nearly matches is taken for a misspelling.
 * @example =CAP.PLAN.DEMAND({"area","year","users";"Quay",2027,100}, {"service","kind","userShare","callsPerHour","holdingTimeS";"voice","call",1,2,90}) is "area"
 */
export function planDemand(demand: any[][], services: any[][]): any[][] {
  return longTable(demandCells, { demand: rawRange(demand), services: rawRange(services) });
}

/**
 * The plan: for every cell, year and scheme the need, what is installed, and what users see.
 * @customfunction PLAN.TABLE
 * @param cells Table Cells with its headings: cell, site, area, shareOfArea, areaKm2, environment.
 * @param demand Table Demand with its headings: area, year, users, errorPerYear.
 * @param services Table Services with its headings.
 * @param routing Table Routing with its headings: service, scheme, year, share.
 * @param radio Table Radio: a column of parameters, then one column of values for each scheme.
 * @param installed Table Installed with its headings: cell, scheme, carriers, fromYear, toYear.
 * @param [year] One year; all years of the forecast by default.
 * @param [percentile] Percentile of the forecast, above 0 and below 1; 0.5, the forecast itself, by default.
 * @returns Table Plan with its headings, one row for each cell, year and scheme.
 * @method Demand as CAP.PLAN.DEMAND, shared out by shareOfArea and routing. FDMA, TDMA: calls with a blocking target share the channels (Erlang B, or Kaufman-Roberts where widths differ); waiting calls and messages have channels of their own (Erlang C with the mean holding time weighted by traffic; targetWaitShare waits no longer than targetWaitS); data takes what calls leave on the mean and a transfer sees capacity less data traffic. OFDMA: the same with bearers of the narrowest call as units, in the direction that fills first; data rate from spectralEfficiency, or the harmonic mean of CAP.RATE.CELLCAPACITY. CDMA: users of the lightest call at loadLimit of the pole, soft blocking, uplink and downlink load within their limits. Required is the smallest number of carriers that keeps every promise. Reach: link budget with shadowing margin and the interference margin at the load, smallest of uplink, downlink and timing. The percentile moves users by CAP.FORECAST.BAND from the first year on.
 * @source Erlang 1917; Kaufman 1981, Roberts 1981; Bonald, Proutiere 2003; Holma, Toskala, WCDMA for UMTS; link budget: common practice. The single functions name theirs.
 * @assumes Busy hours of services as their coincidence says; cells load evenly by shareOfArea. Emergency traffic, radiated power and masts: local regulation and licensed practice govern.
 * @errors #VALUE! names table, row and column of the first wrong cell, or the shares that do not add up to 1.
 * @example =CAP.PLAN.TABLE({"cell","site","area","shareOfArea","areaKm2";"Q1","Q","Quay",1,4}, {"area","year","users";"Quay",2027,100}, {"service","kind","userShare","callsPerHour","holdingTimeS","targetBlocking";"voice","call",1,2,90,0.02}, {"service","scheme","share";"voice","FDMA",1}, {"parameter","FDMA";"channelSpacingKHz",12.5}, {"cell","scheme","carriers";"Q1","FDMA",10}) is "cell"
 */
export function planTable(
  cells: any[][],
  demand: any[][],
  services: any[][],
  routing: any[][],
  radio: any[][],
  installed: any[][],
  year?: any[][],
  percentile?: any[][],
): any[][] {
  return longTable(planCells, {
    cells: rawRange(cells),
    demand: rawRange(demand),
    services: rawRange(services),
    routing: rawRange(routing),
    radio: rawRange(radio),
    installed: rawRange(installed),
    year: optionalNumber(year, domain(1900, 2200, "a whole year from 1900 to 2200", { whole: true })),
    percentile: optionalNumber(percentile, probability, 0.5),
  });
}

/**
 * Totals of a plan for each year, area or scheme.
 * @customfunction PLAN.SUMMARY
 * @param plan Table Plan with its headings, as CAP.PLAN.TABLE gives it.
 * @param [by] "year" (default), "area" or "scheme".
 * @returns Table with headings: users, erlangs, Mbit/s, cells, cells short, carriers, blocking weighted by traffic.
 * @method Sums over the rows of each group; a cell counts once however many schemes it has and is short where any of them is. By area or scheme, years add up too.
 * @source Common practice.
 * @assumes Percentiles of cells do not add: the sum of plans at a percentile is above the percentile of the sum.
 * @errors #VALUE! names table, row and column of the first wrong cell.
 * @example =CAP.PLAN.SUMMARY({"cell","year","scheme","users";"Q1",2027,"FDMA",100}) is "year"
 */
export function planSummary(plan: any[][], by?: any[][]): any[][] {
  return longTable(summaryCells, { plan: rawRange(plan), by: optionalChoice(by, GROUPINGS, "year") });
}

/**
 * Cheapest steps of a ladder that keep every cell within its targets, with dates and costs.
 * @customfunction PLAN.EXPANSION
 * @param plan Table Plan with its headings, as CAP.PLAN.TABLE gives it.
 * @param ladder Table Ladder with its headings: step, fromScheme, carriersAdded, cost, leadTimeMonths and others.
 * @returns Table with headings: cell, step, orderBy, inServiceBy (year-month), cost. Cells that need nothing have no row.
 * @method Exact dynamic programming over how often each step is taken, year by year: cost once, plus costPerYear to the end of the plan, undiscounted; a step is in service from January and ordered leadTimeMonths earlier, and never undone. Carriers add to what is installed; sectors and sites divide the load evenly, each part needing at least its share and the channels that keep its calls at the blocking of the undivided cell (Erlang B; an estimate: recompute the divided cell by CAP.PLAN.TABLE before ordering); carriers beyond maximumCarriers count only from steps with needsSpectrumMHz; sites shrink the reach needed by the root of their number; toScheme moves all users, the target's need growing with its users. A step that requires another comes with or after it.
 * @source R. Bellman, Dynamic Programming, 1957; Erlang B; planning rules: common practice.
 * @assumes Needs between years do not interpolate; spectrum of needsSpectrumMHz must be licensed, which the function does not know. Masts and radiated power: local regulation governs.
 * @errors #VALUE! names table, row and column of the first wrong cell. A cell that no steps can help has a row that says what is missing and when.
 * @example =CAP.PLAN.EXPANSION({"cell","year","scheme","carriersRequired","carriersInstalled";"Q1",2027,"FDMA",3,2}, {"step","fromScheme","carriersAdded","cost","leadTimeMonths";"add carrier","FDMA",1,100,6}) is "cell"
 */
export function planExpansion(plan: any[][], ladder: any[][]): any[][] {
  return longTable(expansionCells, { plan: rawRange(plan), ladder: rawRange(ladder) });
}

/**
 * What differs between two plans: only the cells that moved, with both values.
 * @customfunction PLAN.CHANGES
 * @param before Earlier table Plan with its headings.
 * @param after Later table Plan with its headings.
 * @param [tolerance] Relative difference that does not count; 1e-9 by default.
 * @returns Table with headings: cell, year, scheme, column, before, after, change.
 * @method Rows are matched by cell, year and scheme; a row that only one plan has is listed as absent and present. Columns that only one plan has are left out.
 * @source Common practice.
 * @assumes Cell, year and scheme together name one row.
 * @errors #VALUE! names table, row and column of the first wrong cell.
 * @example =CAP.PLAN.CHANGES({"cell","year","scheme","users";"Q1",2027,"FDMA",100}, {"cell","year","scheme","users";"Q1",2027,"FDMA",120}) is "cell"
 */
export function planChanges(before: any[][], after: any[][], tolerance?: any[][]): any[][] {
  return longTable(changeCells, {
    before: rawRange(before),
    after: rawRange(after),
    tolerance: optionalNumber(tolerance, nonNegative),
  });
}
