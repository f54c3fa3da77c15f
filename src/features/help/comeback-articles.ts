import type { HelpArticle } from './article';

export const comebackArticles: readonly HelpArticle[] = [
  {
    anchor: 'comeback-rate',
    title: 'Came back',
    body: [
      'Of the repairs whose work was done in a month, the share whose machine returned for the same trouble within the shop’s window of days (Settings; 90 unless you changed it). A return belongs to the month, the model and the technician of the first repair, not of the second.',
      'The same trouble means: the same component again, or the same system in complaint, work or lines, or two components that a cascade of that model joins. Where a ticket has no complaint, its notes are read in its place. A yearly service or a set-up is not a return; a service visit whose complaint tells of a trouble is looked at all the same.',
      'Only repairs that could come back are counted: the machine is identified, the ticket is a repair, and it was not a service alone. The page says how many repairs were left out because nobody can tell which machine they were.',
      'Two shares stand on the same count of repairs: came back with the same trouble (what the customer counts), and confirmed as ours. Returns that a person called unrelated, or that follow work which the customer declined, are in neither.',
      'The interval says which true rates are compatible with so many of so few: 2 of 40 is 5 %, and could as well be 1 or 16 %.',
    ],
    formula: 'returned ÷ repairs that could return; interval: Wilson score, 95 %',
    sources: [
      'Wilson (1927), Probable inference, the law of succession, and statistical inference, JASA 22:209–212',
      'Brown, Cai & DasGupta (2001), Interval estimation for a binomial proportion, Statistical Science 16:101–133',
    ],
  },
  {
    anchor: 'limits',
    title: 'Signal or noise: the grey step',
    body: [
      'A month of 60 repairs swings more than one of 240. The grey step is how high (and how low) a month of its own size goes by chance alone, if nothing about the shop has changed from the months before it.',
      'The average is taken from up to 24 earlier months that can be judged, the judged month left out, and there are no limits before six such months. A month beyond its step happens by chance about once in 740 on either side: look for a cause.',
    ],
    formula: 'largest count with P(more | size, average) ≤ 0.135 %, exact binomial, each side',
    sources: [
      'Montgomery, Introduction to Statistical Quality Control, chapter 7 (control charts for fractions; here exact limits in place of the normal ones)',
    ],
  },
  {
    anchor: 'maturing',
    title: 'Hatched months: the window is still open',
    body: [
      'A repair closed last week has had a week to come back, not ninety days. Its month looks good only because it is young. Such months are hatched, are never judged, and never make the headline.',
      'The ring is where the month will end if its repairs go on returning as earlier ones did. A repair that has been out for 60 days without returning has most of its risk behind it; the ring allows for that, repair by repair.',
      'Everything is as of the last day that your records tell of, not of today: a file that ends in April says nothing about May.',
    ],
    formula:
      'projected = (returned + Σ over the rest of (F(window) − F(age)) ÷ (1 − F(age))) ÷ size; F from the Kaplan–Meier curve of days to return of earlier repairs',
    sources: [
      'Kalbfleisch, Lawless & Robinson (1991), Methods for the analysis and prediction of warranty claims, Technometrics 33:273–285',
    ],
  },
  {
    anchor: 'few-jobs',
    title: 'After allowing for few jobs',
    body: [
      'One return in three jobs is not a 33 % problem. For rankings the raw share stands first, and beside it the share after allowing for few jobs: pulled towards the average of all, the more so the fewer the jobs.',
      'How strongly it pulls is estimated from how much the rows really differ. Where they differ no more than chance makes them, all are shown at the average.',
    ],
    formula: 'beta-binomial, maximum likelihood: (returns + α) ÷ (jobs + α + β)',
    sources: ['Efron & Morris (1975), Data analysis using Stein’s estimator, JASA 70:311–319'],
  },
  {
    anchor: 'first-visit-cure',
    title: 'Cured at the first visit',
    body: [
      'A trouble and all the visits that it took are one episode. The share of episodes, old enough to judge, that ended with the first visit.',
    ],
    formula: 'episodes of one visit ÷ episodes whose window is over; Wilson interval',
  },
  {
    anchor: 'comeback-cost',
    title: 'What a comeback cost',
    body: [
      'Labor given away at the shop’s door rate, and parts that nobody paid for, on the return visit. Each comeback is counted once, whatever view it is listed in, and a total is the sum of the repairs listed under it, to the cent.',
      'It is not a booked figure: no account moves by it, and the job that could not be done in that time is not in it.',
    ],
  },
  {
    anchor: 'comeback-reasons',
    title: 'Why it came back',
    body: [
      'The program suggests a reason with its evidence in words; a person decides, and the decision outlives every import and every computation.',
      'Ours are: cause missed, workmanship, wrong part, defective part, work not completed; and part failed again where a person says so. Not ours are: not duplicated, operator or fuel, undetermined. Declined work and unrelated are not counted as coming back at all.',
    ],
  },
  {
    anchor: 'technicians',
    title: 'Rates by technician',
    body: [
      'A return counts for whoever did the first repair; where two worked on it, for both. Small numbers say little about a person, so the share always stands with its interval and with the share after allowing for few jobs.',
      'Owner and service manager see all; a technician sees only their own. With fewer than four technicians the shop’s average is hidden from technicians too, since subtracting one’s own numbers would show the others’.',
    ],
  },
];
