import { Observer, SearchRiseSet, SearchAltitude, Body } from "astronomy-engine";
console.log("# rise, set, civil dawn and dusk in UTC to the second; empty where there is none");
console.log("# npm install astronomy-engine@2.1.19 && node astronomy.mjs > astronomy.csv");
console.log("lat,lon,date,rise,set,dawn,dusk");
const f=e=>e?e.date.toISOString().slice(0,19).replace("T"," "):"";
for (const [lat,lon] of [[57,0],[67,14.5],[-41.3,174.8]])
 for (const d of ["2026-04-01","2026-04-15","2026-06-21","2026-09-30","2026-12-21"]) {
  const o=new Observer(lat,lon,0), night=new Date(+new Date(d+"T00:00Z")-lon*240e3), noon=new Date(+night+43200e3);
  console.log([lat,lon,d,f(SearchRiseSet(Body.Sun,o,+1,night,0.5)),f(SearchRiseSet(Body.Sun,o,-1,noon,0.5)),
   f(SearchAltitude(Body.Sun,o,+1,night,0.5,-6)),f(SearchAltitude(Body.Sun,o,-1,noon,0.5,-6))].join(","));
 }
