import { createTidePredictor } from "@neaps/tide-predictor";
const names=["M2","S2","N2","K1","O1","P1","Q1","K2","M4","MS4","NU2","MU2","2N2","L2","LAM2","T2","MN4","M6","S4","2MS6","SA","SSA"];
console.log("# each constituent alone, amplitude 1 m, phase 0: level in metres at a UTC time");
console.log("# npm install @neaps/tide-predictor@0.11.0 && node constituents.mjs > constituents.csv");
console.log("time,"+names.join(","));
for (const t of ["1997-03-02T05:00","2004-04-19T12:00","2011-11-30T21:00","2016-07-07T03:00","2021-01-15T18:00","2026-04-15T00:00","2026-09-01T10:00","2031-12-24T16:00","2039-06-05T07:00"]) {
 const start=new Date(t+":00Z"), end=new Date(+start+3600e3);
 console.log(t.replace("T"," ")+","+names.map(n=>createTidePredictor([{name:n,amplitude:1,phase:0}]).getTimelinePrediction({start,end})[0].level.toFixed(4)).join(","));
}
