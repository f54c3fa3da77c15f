import { measureStanding, standingRows } from './cascade-standing';

const [seed, ...only] = process.argv.slice(2);
const firstSeed = seed === undefined ? Date.now() % 1_000_000_000 : Number(seed);
const share = (value: number | null) => (value === null ? '–' : value.toFixed(3));

console.log(`Cascades on shops of our own making, seeds from ${String(firstSeed)}`);
console.log('| units a model × models | shops | findings | precision | recall | reversed | shops with any |');
console.log('| --- | --- | --- | --- | --- | --- | --- |');
const rows = standingRows
  .filter((_, at) => only.length === 0 || only.includes(String(at + 1)))
  .map((settings) => {
    const row = measureStanding(settings, firstSeed);
    const cells = [row.row, row.shops, row.findings, share(row.precision), share(row.recall), row.reversed];
    console.log(`| ${[...cells, row.shopsWithAny].join(' | ')} |`);
    return row;
  });
console.log(JSON.stringify({ cascades: { firstSeed, rows } }));
