import { spawnSync } from 'node:child_process';
import { bLife, findCascades, fitWeibull, kaplanMeier } from '../../analytics/index';
import type { LifeObservation } from '../../analytics/types';
import type { Measure } from './measure';
import { unseenVisits } from './unseen-visits';

const RUNS = 5;

/** The same lives for whoever compares: a Lehmer generator, Weibull lives of shape 1.5, uniform censoring, tenths. */
export function speedLives(count: number): LifeObservation[] {
  let state = 20_260_101;
  const next = () => (state = (48_271 * state) % 2_147_483_647) / 2_147_483_647;
  return Array.from({ length: count }, () => {
    const life = 1000 * (-Math.log(next())) ** (1 / 1.5);
    const censored = 1000 * next();
    return {
      time: Math.max(0.1, Math.floor(Math.min(life, censored) * 10 + 0.5) / 10),
      failed: life <= censored,
    };
  });
}

export function benchStatistics(): Measure[] {
  const lives = speedLives(1_000_000);
  const fit = fitWeibull(lives);
  if (fit.kind !== 'estimate') throw new Error('a million lives were not enough');
  const measures: Measure[] = [
    { name: 'fitWeibull, 1,000,000 rows, median of 5', value: median(() => fitWeibull(lives)), unit: 's' },
    { name: 'kaplanMeier, 1,000,000 rows, median of 5', value: median(() => kaplanMeier(lives)), unit: 's' },
    {
      name: 'bLife by profile likelihood',
      value: median(() => bLife(fit, 10, { limits: 'profile' })),
      unit: 's',
    },
    { name: 'shape', value: fit.shape, unit: '(R survival 3.5-3: 1.50118)' },
    { name: 'scale', value: fit.scale, unit: '(R survival 3.5-3: 999.160)' },
  ];
  for (const lines of [55_000, 1_000_000]) {
    const visits = unseenVisits(lines);
    const started = performance.now();
    const { findings } = findCascades(visits);
    const seconds = (performance.now() - started) / 1000;
    measures.push({
      name: `findCascades, ${lines.toLocaleString('en-US')} lines`,
      value: seconds,
      unit: `s (${findings.length} findings)`,
    });
  }
  return [...measures, ...timesOfR()];
}

function median(work: () => unknown): number {
  const times = Array.from({ length: RUNS }, () => {
    const started = performance.now();
    work();
    return (performance.now() - started) / 1000;
  });
  return times.sort((a, b) => a - b)[Math.floor(RUNS / 2)] ?? NaN;
}

const IN_R = `suppressMessages(library(survival)); x <- 20260101; n <- 1e6; u <- numeric(2*n)
for (i in seq_along(u)) { x <- (48271*x) %% 2147483647; u[i] <- x/2147483647 }
a <- u[c(TRUE,FALSE)]; b <- u[c(FALSE,TRUE)]; t <- 1000*(-log(a))^(1/1.5); c <- 1000*b
time <- pmax(.1, floor(pmin(t,c)*10+.5)/10); s <- as.integer(t<=c)
m <- function(e) median(replicate(5, system.time(eval(e))[["elapsed"]]))
cat(m(quote(survreg(Surv(time,s)~1))), m(quote(survfit(Surv(time,s)~1))))`;

/** R's own times in the same run, where R and its survival package are installed. */
function timesOfR(): Measure[] {
  const { stdout, status } = spawnSync('Rscript', ['-e', IN_R], { encoding: 'utf8' });
  if (status !== 0) return [{ name: 'R survival: not installed here, so not compared', value: 0, unit: '' }];
  const [survreg = NaN, survfit = NaN] = stdout.trim().split(/\s+/).map(Number);
  return [
    { name: 'R survreg, 1,000,000 rows, median of 5', value: survreg, unit: 's' },
    { name: 'R survfit, 1,000,000 rows, median of 5', value: survfit, unit: 's' },
  ];
}
