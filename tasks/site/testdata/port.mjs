import { createTidePredictor } from "@neaps/tide-predictor";
console.log("# high and low waters of an invented port: mean level 2.6 m, M2 1.40 m 30 deg, S2 0.50 70, K1 0.12 180, O1 0.10 20");
console.log("# npm install @neaps/tide-predictor@0.11.0 && node port.mjs > port.csv");
console.log("time,metres,water");
const cs=[["M2",1.40,30],["S2",.50,70],["K1",.12,180],["O1",.10,20]].map(([name,amplitude,phase])=>({name,amplitude,phase}));
for (const e of createTidePredictor(cs,{offset:2.6}).getExtremesPrediction({start:new Date("2026-04-13T00:00Z"),end:new Date("2026-04-20T00:00Z")}))
 console.log([new Date(e.time).toISOString().slice(0,19).replace("T"," "),e.level.toFixed(3),e.high?"HW":"LW"].join(","));
