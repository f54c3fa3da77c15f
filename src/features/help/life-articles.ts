import type { HelpArticle } from './article';

export const lifeArticles: readonly HelpArticle[] = [
  {
    anchor: 'part-life',
    title: 'Share still running',
    body: [
      'A life runs from when a part was put into a machine to when it failed there, or to the last time that the machine was known running with it. The steps show which share is still running at each age, from all lives: also those that have not failed yet.',
      'A part that was changed at a service, or because a newer one was better, did not fail: it counts as running up to that age. A part broken by another one counts likewise, and is shown among what its cause takes with it.',
      'Nothing is invented after the last reading: a machine last seen at 200 hours says nothing about 300. The numbers under the axis are how many were still under observation; where they get small, the band gets wide.',
    ],
    formula: 'S(t) = Π (1 − failed ÷ at risk); at risk when entry < t ≤ exit; 95 % band: Greenwood, log-log',
    sources: [
      'Kaplan & Meier (1958), Nonparametric estimation from incomplete observations, JASA 53:457–481',
      'Lawless (2003), Statistical Models and Methods for Lifetime Data, 2nd ed., Wiley',
    ],
  },
  {
    anchor: 'weibull',
    title: 'The line, and what its shape says',
    body: [
      'The smooth line is a Weibull distribution fitted by maximum likelihood, with parts that are still running, and parts known only from some age on, taken for what they are. Its shape says how the risk changes with age.',
      'Limits wholly below 1: it fails young (fitting, defective parts). Wholly above 1: it wears out, and a planned replacement age makes sense. Spanning 1: these failures cannot tell. Only if the limits lie within 0.8 to 1.25 is it said that there is no pattern with age.',
      'No line is drawn under two different failure ages, and below six failures it is called few. Where steps and line part company, the line is wrong: two kinds of failure in one curve look like two slopes.',
    ],
    formula:
      'S(t) = exp(−(t ÷ η)^β); limits from the observed information on the log scale, from the profile likelihood below 20 failures',
    sources: [
      'Meeker, Escobar & Pascual (2022), Statistical Methods for Reliability Data, 2nd ed., Wiley',
      'IEC 61649:2008, Weibull analysis',
    ],
  },
  {
    anchor: 'one-in-ten',
    title: 'One in ten by, half by',
    body: [
      'The age by which one in ten (B10) and by which half (B50) have failed, from the fitted line, with their limits. A limit that is not shown lies beyond what these failures can say.',
    ],
    formula: 't(p) = η · (−ln(1 − p))^(1 ÷ β); limits by the delta method or the profile likelihood',
    sources: ['Meeker, Escobar & Pascual (2022), chapter 8', 'IEC 61649:2008'],
  },
  {
    anchor: 'old-and-new-numbers',
    title: 'Old number, new number',
    body: [
      'A newer part number is often made because the older one failed too often, so their lives are never poured together by themselves: choose to pool or to compare.',
      'The comparison says how often the newer fails at the same age, as a multiple of the older. Its limits spanning 1 means: no difference shown yet. The newer number is younger by nature, and that is allowed for.',
    ],
    formula:
      'Weibull regression with a common shape: ratio of hazards, profile limits; log-rank test beside it',
    sources: ['Mantel (1966), Cancer Chemotherapy Reports 50:163–170', 'Lawless (2003), chapter 6'],
  },
  {
    anchor: 'unknown-reasons',
    title: 'Reasons that nobody wrote down',
    body: [
      'A line that does not say why the part was replaced is unknown, and stays so. It becomes failed or maintenance only through a choice that a person of the shop made for that component: a service item, or only changed when bad.',
      'What the unknowns could do is shown as bounds: the curve if all of them had failed, and if none had. Where few reasons are known, the bounds are far apart, and that is the honest answer.',
    ],
  },
  {
    anchor: 'assumed-original',
    title: 'Machines whose past is not known',
    body: [
      'A machine that first came in at 300 hours may carry its first clutch or its third. Its parts are left out unless you switch on “assume they are original”; they then count only from the age at which the machine became known, since an earlier failure would not have been seen.',
      'Machines of the register that the shop knows from new need no such assumption.',
    ],
    formula: 'delayed entry: S(t) ÷ S(entry)',
    sources: ['Hong, Meeker & McCalley (2009), Annals of Applied Statistics 3:857–879'],
  },
  {
    anchor: 'clocks',
    title: 'Hours or months',
    body: [
      'A bearing ages in running hours, a battery in months. Hours are used where at least four in five lives have them; else the calendar. Missing hours are never filled in with an average: heavy users fail first, and their average would make every part look better than it is. Where a visit has no reading, the hours are taken from the line between that same machine’s readings before and after, and it is said for how many; where there is none after, the life is left out.',
    ],
    sources: [
      'Lawless, Hu & Cao (1995), Methods for the estimation of failure distributions and rates from automobile warranty data, Lifetime Data Analysis 1:227–240',
    ],
  },
  {
    anchor: 'meter-hours',
    title: 'Hour readings that are not used',
    body: [
      'A reading that goes back, would need more than 24 hours a day, or is out of line with those before and after it is kept as it was read, and not used. 0, 1 and 9999 are taken for “not read” unless the machine’s other readings bear them out.',
      'A replaced meter starts again near zero. Where the old one’s last reading was written down the hours go on from it; else lives that run over the change end at the last reading that can be trusted.',
    ],
  },
  {
    anchor: 'machines',
    title: 'Among machines that came in',
    body: [
      'A shop sees a machine because something failed. From such machines alone every part looks worse than it is, and no rate of a fleet can be given. Where the machines are not in a register (what the shop sold or looks after), the figure says “among machines that came in”; comparisons still hold, levels do not.',
    ],
    sources: [
      'Kalbfleisch & Lawless (1988), Estimation of reliability in field-performance studies, Technometrics 30:365–378',
    ],
  },
];
