import { decibel, nonNegative, requireIn } from "../domain";

/**
 * Receiver sensitivity in dBm: the weakest signal at which the required SINR is reached.
 *
 * @param noiseFloorDbm thermal noise and noise figure in the receiver's bandwidth
 * @param requiredSinrDb SINR that the service needs
 * @param implementationLossDb loss of the real receiver against the SINR stated, at least 0
 */
export function sensitivity(noiseFloorDbm: number, requiredSinrDb: number, implementationLossDb = 0): number {
  requireIn(decibel, "noiseFloorDbm", noiseFloorDbm);
  requireIn(decibel, "requiredSinrDb", requiredSinrDb);
  requireIn(nonNegative, "implementationLossDb", implementationLossDb);
  return noiseFloorDbm + requiredSinrDb + implementationLossDb;
}

/**
 * Largest path loss in dB that a link bears.
 *
 * @param eirpDbm equivalent isotropically radiated power of the sender
 * @param sensitivityDbm of the receiver
 * @param gainsDb at the receiving end: antenna, diversity, soft handover
 * @param lossesDb feeder, body, building
 * @param marginsDb shadowing, interference, fast fading
 */
export function maxLoss(eirpDbm: number, sensitivityDbm: number, gainsDb = 0, lossesDb = 0, marginsDb = 0): number {
  requireIn(decibel, "eirpDbm", eirpDbm);
  requireIn(decibel, "sensitivityDbm", sensitivityDbm);
  requireIn(decibel, "gainsDb", gainsDb);
  requireIn(decibel, "lossesDb", lossesDb);
  requireIn(decibel, "marginsDb", marginsDb);
  return eirpDbm - sensitivityDbm + gainsDb - lossesDb - marginsDb;
}
