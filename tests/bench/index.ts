import { report, type Measure } from './measure';
import { benchReadApi } from './read-api';
import { benchStatistics } from './statistics';
import { benchWholeWay } from './whole-way';

/** Speed of everything that is promised to be quick; a table and JSON, no gate. Name some to run only these. */
const BENCHES: Record<string, () => Promise<Measure[]> | Measure[]> = {
  statistics: benchStatistics,
  'whole-way': benchWholeWay,
  'read-api': benchReadApi,
};

const wanted = process.argv.slice(2);
const all: Record<string, Measure[]> = {};
for (const [name, bench] of Object.entries(BENCHES)) {
  if (wanted.length > 0 && !wanted.includes(name)) continue;
  all[name] = await bench();
  report(name, all[name]);
}
process.stdout.write(`\n${JSON.stringify(all)}\n`);
