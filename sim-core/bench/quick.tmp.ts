import { createSimdKernel } from '#sim-core/kernel/simd/simd-kernel.ts';
import { benchCase } from './cases.ts';
import { compileYardstick } from './yardstick.ts';
const y = compileYardstick();
for (const size of (process.argv[2] ?? '500,2000').split(',').map(Number)) for (const map of (process.argv[3] ?? 'full,sparse').split(',') as ('full'|'sparse')[]) for (const mode of (process.argv[4] ?? 'mean-field,counts').split(',') as ('mean-field'|'counts')[]) {
  const b = { ...benchCase(mode,map,size), rounds: 10 };
  let best = Infinity; let cs = Infinity;
  const ks = [0,1].map(()=>createSimdKernel(b.setup)); for (let i=0;i<3;i++) ks[0].step(i,-1);
  for (let round=0;round<3;round++) {
  for (let r=0;r<b.rounds;r++){ const k2=createSimdKernel(b.setup); const t=process.cpuUsage(); for(let s=0;s<b.steps;s++) k2.step(s,b.droughtIndex); {const u=process.cpuUsage(t);best=Math.min(best,(u.user+u.system)/1e6);}; } 
  cs = Math.min(cs, 'reason' in y ? 1 : y.time(b).seconds); }
  console.log(mode,map,size,'ns/cell',(best/size/size/b.steps*1e9).toFixed(2),'c',(cs/size/size/b.steps*1e9).toFixed(2),'ratio',(cs/best).toFixed(2));
}
