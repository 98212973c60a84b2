import psychrolib from "psychrolib";
psychrolib.SetUnitSystem(psychrolib.SI);
console.log("# dew point in C of air at a temperature and humidity; below 0 C the package gives the frost point");
console.log("# npm install psychrolib@1.1.1 && node dew.mjs > dew.csv");
console.log("air,rh,dew");
for (const t of [5,8,10,12,15,20,25,30]) for (const rh of [50,60,70,75,80,85,90,95])
 console.log([t,rh,psychrolib.GetTDewPointFromRelHum(t,rh/100).toFixed(3)].join(","));
