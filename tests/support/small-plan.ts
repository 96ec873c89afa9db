/** A small invented plan as CSV files: two areas, three cells, two years, two schemes. */
export const SMALL_PLAN: Readonly<Record<string, string>> = {
  "demand.csv": "area,year,users\nEbb Quay,2027,400\nEbb Quay,2028,520\nMoor Relay,2027,90\nMoor Relay,2028,95\n",
  "services.csv": [
    "service,kind,userShare,callsPerHour,holdingTimeS,targetBlocking,downMBPerDay,upMBPerDay,busyHourShare,targetMbps,downKbps,upKbps",
    "voice,call,1,1,60,0.02,,,,,12.2,12.2",
    "data,data,0.5,,,,20,5,0.1,0.5,,",
    "",
  ].join("\n"),
  "routing.csv": "service,scheme,share\nvoice,Narrow,0.8\nvoice,Broad,0.2\ndata,Broad,1\n",
  "radio.csv": [
    "parameter,Narrow,Broad",
    "access,TDMA,OFDMA",
    "channelSpacingKHz,25,",
    "slotsPerCarrier,4,",
    "blocks,,25",
    "blockBandwidthKHz,,180",
    "spectralEfficiency,,1.2",
    "",
  ].join("\n"),
  "cells.csv": "cell,site,area,shareOfArea,areaKm2\nQ1,Q,Ebb Quay,0.6,3\nQ2,Q,Ebb Quay,0.4,3\nM1,M,Moor Relay,1,40\n",
  "installed.csv": "cell,scheme,carriers\nQ1,Narrow,3\nQ2,Narrow,2\nM1,Narrow,1\nQ1,Broad,1\nQ2,Broad,1\nM1,Broad,1\n",
};
