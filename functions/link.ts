import { decibel, nonNegative } from "../src/model/domain";
import * as link from "../src/model/radio/link";
import { number, optionalNumber, perCell } from "../src/sheet/call";

/**
 * Receiver sensitivity: the weakest signal at which the required SINR is reached.
 * @customfunction LINK.SENSITIVITY
 * @param noiseFloorDbm Noise of the receiver in dBm, noise figure included (NOISE.FLOOR).
 * @param requiredSinrDb SINR in dB that the service needs in that bandwidth.
 * @param [implementationLossDb] Loss of the real receiver in dB, at least 0; 0 if left out.
 * @returns Power in dBm.
 * @method Noise floor + required SINR + implementation loss.
 * @source Definition; common practice of link budgets.
 * @assumes Noise alone; interference belongs in the margins of LINK.MAXLOSS.
 * @example =CAP.LINK.SENSITIVITY(-127, 8, 2) is -117
 */
export function linkSensitivity(
  noiseFloorDbm: any[][],
  requiredSinrDb: any[][],
  implementationLossDb?: any[][],
): any[][] {
  return perCell(link.sensitivity, {
    noiseFloorDbm: number(noiseFloorDbm, decibel),
    requiredSinrDb: number(requiredSinrDb, decibel),
    implementationLossDb: optionalNumber(implementationLossDb, nonNegative, 0),
  });
}

/**
 * Largest path loss that a link bears.
 * @customfunction LINK.MAXLOSS
 * @param eirpDbm Radiated power of the sender in dBm (EIRP: transmitter, feeder and antenna together).
 * @param sensitivityDbm Sensitivity of the receiver in dBm.
 * @param [gainsDb] Sum of the receiving end's gains in dB: antenna, diversity; 0 if left out.
 * @param [lossesDb] Sum of losses in dB: feeder, body, building; 0 if left out.
 * @param [marginsDb] Sum of margins in dB: shadowing, interference, fading; 0 if left out.
 * @returns Path loss in dB.
 * @method EIRP - sensitivity + gains - losses - margins.
 * @source Definition; common practice of link budgets.
 * @assumes Radiated power and human exposure are bound by the local licence and exposure limits: they govern, whatever a budget allows. Uplink and downlink need a budget each.
 * @example =CAP.LINK.MAXLOSS(44, -117, 0, 6, 12) is 143
 */
export function linkMaxloss(
  eirpDbm: any[][],
  sensitivityDbm: any[][],
  gainsDb?: any[][],
  lossesDb?: any[][],
  marginsDb?: any[][],
): any[][] {
  return perCell(link.maxLoss, {
    eirpDbm: number(eirpDbm, decibel),
    sensitivityDbm: number(sensitivityDbm, decibel),
    gainsDb: optionalNumber(gainsDb, decibel, 0),
    lossesDb: optionalNumber(lossesDb, decibel, 0),
    marginsDb: optionalNumber(marginsDb, decibel, 0),
  });
}
