/** A phrase of complaints and the system that it points to. */
export type ComplaintPhrase = { phrase: string; systemId: string };

/** A new shop's table, by the plain names of systems; it proposes, the shop's own table rules. */
export const STARTER_COMPLAINT_PHRASES: readonly { phrase: string; system: string }[] = [
  ...phrases(
    'PTO drive',
    'pto',
    'blades wont engage',
    'blades will not engage',
    'blades wont turn on',
    'blades not engaging',
    'blades do not engage',
    'blades dont engage',
  ),
  ...phrases(
    'PTO drive',
    'blades stop',
    'blades quit',
    'blades drop out',
    'blades cut out',
    'blades kick out',
    'clutch',
  ),
  ...phrases(
    'charging',
    'not charging',
    'wont charge',
    'no charge',
    'battery dead',
    'dead battery',
    'battery keeps dying',
  ),
  ...phrases('charging', 'battery dies', 'battery drains', 'alternator', 'stator', 'regulator'),
  ...phrases(
    'starting',
    'wont crank',
    'will not crank',
    'no crank',
    'wont turn over',
    'will not turn over',
    'just clicks',
  ),
  ...phrases(
    'starting',
    'wont start',
    'will not start',
    'does not start',
    'doesnt start',
    'no start',
    'hard to start',
    'hard start',
  ),
  ...phrases('starting', 'only clicks', 'starter', 'solenoid', 'recoil', 'pull cord', 'pull rope'),
  ...phrases(
    'fuel',
    'carburetor',
    'carb',
    'fuel leak',
    'leaking fuel',
    'leaking gas',
    'gas leak',
    'leaks gas',
    'surging',
  ),
  ...phrases(
    'fuel',
    'surges',
    'hunting',
    'floods',
    'flooding',
    'starves',
    'runs lean',
    'runs rich',
    'bad gas',
    'old gas',
  ),
  ...phrases('ignition', 'no spark', 'spark', 'misfires', 'misfiring', 'ignition coil'),
  ...phrases(
    'cutting deck',
    'deck',
    'spindle',
    'uneven cut',
    'cuts uneven',
    'not cutting',
    'vibrates',
    'vibration',
  ),
  ...phrases('cutting deck', 'blade belt', 'throws belt', 'throwing belt', 'wont cut'),
  ...phrases(
    'drive',
    'wont move',
    'will not move',
    'wont drive',
    'no reverse',
    'no drive',
    'wont pull',
    'hydro',
    'transaxle',
  ),
  ...phrases('drive', 'transmission', 'self propel', 'drive belt', 'loses drive', 'jerks'),
  ...phrases(
    'safety circuit',
    'seat switch',
    'safety switch',
    'interlock',
    'brake switch',
    'dies when getting off',
  ),
  ...phrases('chassis', 'steering', 'tire', 'wheel', 'front axle', 'seat broken', 'hood'),
  ...phrases(
    'engine',
    'smokes',
    'smoking',
    'burns oil',
    'burning oil',
    'oil leak',
    'leaking oil',
    'leaks oil',
    'knocking',
  ),
  ...phrases(
    'engine',
    'low power',
    'no power',
    'no compression',
    'backfires',
    'overheats',
    'overheating',
    'seized',
  ),
];

/** Said of a machine that is in trouble. Words that also stand in orders for service are left out on purpose. */
const TROUBLE = new RegExp(
  '\\b(?:' +
    [
      '(?:wont|will not|wouldnt|would not|cannot|cant|can not|couldnt) (?!be (?:home|here|in|back|available)\\b)\\w+',
      '(?:doesnt|does not|didnt|did not|isnt|is not|not) (?:\\w+ )?(?:start\\w*|run\\w*|crank\\w*|turn\\w*|mov\\w+|driv\\w+|engag\\w+|cut\\w*|charg\\w+|work\\w*|stay\\w*|idl\\w+|pull\\w*|spin\\w*|prim\\w+)',
      'hard (?:to )?start\\w*',
      'no (?:start|spark|crank|power|drive|reverse|charge|fuel|compression)',
      'dies|died|dying|stalls?|stalled|stalling|quits?|quitting|shuts? (?:off|down)|cuts? out|drops? out|kicks? out',
      'broken?|breaks|breaking|cracked|bent|torn|snapped|seized|stuck|stripped|burnt|burned|burning|melted',
      'leaks?|leaking|smokes?|smoking|overheat\\w*|surg(?:es|ing)|backfir\\w+|misfir\\w+|sputter\\w*|bogs?|flood(?:s|ing|ed)',
      'nois[ey]|grind(?:s|ing) (?:noise|sound)|squeal\\w*|squeak\\w*|rattl\\w+|knocking|vibrat\\w+|slip(?:s|ping)',
      'blow(?:s|ing)? (?:a )?fuses?|blown|blew|dead|clicks|clicking|throw(?:s|ing)|threw|keeps \\w+ing|comes? off|came off|fell off',
      'intermittent\\w*|still (?!under\\b)\\w+|again|same (?:problem|trouble|issue|thing)|came back|comeback',
    ].join('|') +
    ')\\b',
);
const DENIAL =
  /\b(?:no|not any|without|nothing) (?:\w+ )?(?:problems?|complaints?|issues?|troubles?|leaks?|noises?|concerns?)\b/g;
const NOT_OF_THE_MACHINE =
  /\b(?:broken in|break in|deadline|dead of winter|call again|see again|again this year|same as last)\b/g;
const SERVICE =
  /\b(?:service|oil change|change oil|tune ?up|tuneup|maintenance|winteri[sz]e|winteri[sz]ation|sharpen\w*|annual|seasonal|check ?up|inspection|pre ?season|storage|set ?up|pdi|grease|filters?|\d+ ?(?:hr|hrs|hour|hours))\b/;
const DECLINED =
  /\b(?:declin\w+|refused (?:repair|work|the)|not authori[sz]ed|(?:didnt|did not) (?:approve|authori[sz]e|want (?:it|to (?:repair|replace|fix)))|customer said no|against (?:our )?recommendation)\b/;
const OPERATOR_OR_FUEL =
  /\b(?:(?:stale|old|bad|contaminated|wrong) (?:fuel|gas|gasoline|mix)|water in (?:the )?(?:fuel|gas|tank|carb)|operator (?:error|damage)|misuse|abuse|accident|(?:hit|struck) (?:a |the )?(?:stump|rock|root|curb|pipe|stake)|blade strike|left (?:the )?key on|out of (?:gas|fuel)|ran (?:it )?without oil|no oil)\b/;
const LEFT_OPEN =
  /\b(?:back ?order\w*|waiting (?:for|on) parts?|parts? on order|temporary (?:repair|fix)|temporarily|will return|to be (?:done|finished|completed) later|incomplete|not completed)\b/;

/** A text folded for matching: lower case, apostrophes dropped, everything else that is no letter or digit a space. */
export function foldText(text: string | null | undefined): string {
  if (!text) return '';
  return text
    .toLowerCase()
    .replace(/['’`]/g, '')
    .replace(/[^a-z0-9]+/g, ' ')
    .trim();
}

/**
 * Whether a complaint is of a trouble, so that the visit is not maintenance only, whatever its lines say.
 * Conservative: it says so only on words that orders for service do not use.
 */
export function readsAsTrouble(complaint: string | null | undefined): boolean {
  const text = foldText(complaint).replace(DENIAL, ' ').replace(NOT_OF_THE_MACHINE, ' ');
  return TROUBLE.test(text);
}

/** Whether a complaint orders a service and names no trouble. */
export function readsAsService(complaint: string | null | undefined): boolean {
  return SERVICE.test(foldText(complaint)) && !readsAsTrouble(complaint);
}

/** Whether the record says that the customer declined work. */
export function readsAsDeclined(...texts: (string | null | undefined)[]): boolean {
  return texts.some((text) => DECLINED.test(foldText(text)));
}

/** Whether the record blames fuel, operation or an accident. */
export function readsAsOperatorOrFuel(...texts: (string | null | undefined)[]): boolean {
  return texts.some((text) => OPERATOR_OR_FUEL.test(foldText(text)));
}

/** Whether the record says that work was left open. */
export function readsAsLeftOpen(...texts: (string | null | undefined)[]): boolean {
  return texts.some((text) => LEFT_OPEN.test(foldText(text)));
}

/** Makes the function that names the systems a complaint points to, by whole words of the phrases. */
export function systemReader(
  table: readonly ComplaintPhrase[],
): (complaint: string | null | undefined) => string[] {
  const entries = table.flatMap(({ phrase, systemId }) => {
    const folded = foldText(phrase);
    return folded === '' ? [] : [{ needle: ` ${folded} `, systemId }];
  });
  return (complaint) => {
    const text = foldText(complaint);
    if (text === '') return [];
    const padded = ` ${text} `;
    return [
      ...new Set(entries.filter(({ needle }) => padded.includes(needle)).map(({ systemId }) => systemId)),
    ];
  };
}

function phrases(system: string, ...list: string[]): { phrase: string; system: string }[] {
  return list.map((phrase) => ({ phrase, system }));
}
