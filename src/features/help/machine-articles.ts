import type { HelpArticle } from './article';

export const machineArticles: readonly HelpArticle[] = [
  {
    anchor: 'cascade',
    title: 'What takes what with it',
    body: [
      'The order of replacement is not the order of cause. The part that was damaged is often cheap and in sight and is replaced first; the one that did the damage is replaced last, when the visits stop.',
      'For every pair of components of a model five things are asked. Was trouble back within the window oftener when only the one was replaced than when both were? Do the two fail near each other oftener than their own ages make likely? Which of them ended the trouble? Is the finding one of the few that chance would turn up among all the pairs examined? And where a model has few machines, do others of its family show the same?',
      'Chains that the trade knows are named beforehand; all other pairs are searched apart. Of all that is shown, at most one in twenty is expected to be chance.',
      'Evidence comes in three words. Seen together: they fail near each other. Replaced before: the trouble went on until the other part was replaced. Tested as cause: a reading or a bench test of the removed part says so. Only what was tested is a cause; the rest is a good reason to test.',
      'A pair’s page shows every count, and they add up; it lists the repairs that speak for the finding, and those that speak against it.',
    ],
    formula:
      'exact one-sided tests of returns and excess, empirical Bayes over models, false discovery rate limited to 5 %',
    sources: [
      'Fisher (1935), The Design of Experiments',
      'Benjamini & Hochberg (1995), Controlling the false discovery rate, JRSS B 57:289–300',
      'Efron (2010), Large-Scale Inference, Cambridge University Press',
      'Hallas (1996), Evidence of depression provoked by cardiovascular medication: a prescription sequence symmetry analysis, Epidemiology 7:478–484',
      'Tsiropoulos, Andersen & Hallas (2009), Adverse events with use of antiepileptic drugs: a prescription and event symmetry analysis, Pharmacoepidemiology and Drug Safety 18:483–491',
    ],
  },
  {
    anchor: 'together',
    title: 'Pairs that only fail together',
    body: [
      'Two components that fail near each other oftener than their ages explain, while nothing says which takes the other: a common cause, perhaps, or one that the records do not show. No direction is claimed.',
    ],
  },
  {
    anchor: 'case-file',
    title: 'Case files',
    body: [
      'Seen a few times and not proven: the repairs are listed for whoever wants to read them, and nothing is claimed.',
    ],
  },
  {
    anchor: 'mtbf',
    title: 'Mean time between repairs',
    body: [
      'Given only where the end of observation is not itself a repair (a register reading, or the calendar for machines still in use), and only where the rate does not change with age. Else the curve is shown, not the mean.',
    ],
    formula: 'time under observation ÷ failures; limits from χ² with 2r and 2r + 2 degrees of freedom',
    sources: ['NIST/SEMATECH e-Handbook of Statistical Methods, 8.4.5.1'],
  },
  {
    anchor: 'mean-cumulative',
    title: 'Repairs a machine needs, by age',
    body: [
      'How many repairs a machine has had on average by each age, from all machines for as long as each was observed. A curve that bends upwards: they come faster as the machine ages. The band allows for machines that differ.',
    ],
    formula: 'M(t) = Σ repairs at t ÷ machines observed at t; robust (sandwich) limits',
    sources: ['Nelson (2003), Recurrent Events Data Analysis for Product Repairs, ASA-SIAM'],
  },
  {
    anchor: 'trend',
    title: 'Do repairs come faster with age?',
    body: [
      'A test of whether the repairs lie late or early in the time that the machines were observed. “No trend shown” is not proof that there is none.',
    ],
    formula: 'Laplace test; power-law process for the pace',
    sources: ['Crow (1975), AMSAA TR-138', 'IEC 61710:2013, Power law model'],
  },
  {
    anchor: 'forecast',
    title: 'Looking ahead',
    body: [
      'From a fitted life, the chance that a part now of a given age fails within the next hours or months. This version shows lives and limits; a season’s expected failures are not drawn from fewer of them than can be defended.',
    ],
    formula: 'P(fail within Δ | running at a) = 1 − S(a + Δ) ÷ S(a)',
    sources: ['Meeker, Escobar & Pascual (2022), chapter 15'],
  },
  {
    anchor: 'what-is-known',
    title: 'What your records say, and where it came from',
    body: [
      'Component and reason of every line carry their origin: in the file, the parts list, the shop’s dictionary, the shop’s rule for that component, a person on that repair, or not known. The raw texts stay as they came. Nothing is guessed silently.',
    ],
  },
  {
    anchor: 'imports',
    title: 'Files that go in',
    body: [
      'CSV (comma, semicolon, tab; UTF-8, UTF-16 or Windows-1252) and XLSX. One row a line of a repair; rows with the same location and number are one repair. Only number and closing date must be there. Dates are read in the one format that you confirm: 4/5 is April or May, and the program does not guess.',
      'One bad row keeps its whole repair out, so that no repair is half there; all its rows can be fetched, mended and sent again. The same file twice changes nothing. A column that is not in the file leaves what is there; an empty cell clears the repair’s own field and never a machine’s.',
      'An import can be undone as long as nothing later has built on what it brought.',
    ],
    sources: ['RFC 4180, Common Format and MIME Type for CSV Files'],
  },
];
