import type { Component } from './components';
import { COMPONENTS } from './components';
import { dateOf } from './calendar';
import type { Model } from './makers';
import { modelsOfFamily } from './makers';
import { centsText } from './money';
import type { PartRow } from './native-rows';
import { createRandom } from './random';
import type { Random } from './random';

export interface Part {
  number: string;
  maker: string;
  supplier: string;
  description: string;
  component: Component;
  listCents: number;
  isKit: boolean;
}

const SUPPLIERS: Readonly<Record<string, string>> = {
  Tarnlow: 'Calder Bend Distributing',
  Oakrill: 'Oakrill Parts Direct',
  Greyhollow: 'Calder Bend Distributing',
  Brackwater: 'Northfen Power Supply',
  Pellbrook: 'Northfen Power Supply',
  Millgate: 'Harrow & Finch Jobbers',
};

const CLUTCH_FAMILY = 'Tarnlow 38-series clutch';

/** The old clutch of the 38 series and the kit that took its place half way through the records. */
export const CLUTCH_SUPERSESSION = {
  oldNumber: '38-2114',
  newNumber: '38-2290',
  oldLife: { shape: 1.9, scaleHours: 590 },
  newLife: { shape: 2, scaleHours: 2100 },
  fitmentNote:
    'Kit 38-2290 replaces 38-2114. Machines with the two-blade plug need the connector jumper lead in the kit. The key is built into the rotor bore: leave the loose key out. A flat stabilizer bar takes the place of the round one that wore its slot. Check the air gap at three slots and burnish before use.',
} as const;

const takesKit = (model: Model, component: Component): boolean =>
  component.name === 'PTO clutch' && modelsOfFamily(CLUTCH_FAMILY).has(model.model);

function listCentsOf(component: Component, key: string): number {
  const [low, high] = component.price;
  return Math.round(createRandom('price', component.name, key).between(low, high) * 20) * 5;
}

function createPart(model: Model, component: Component, isKit: boolean): Part {
  const at = COMPONENTS.indexOf(component);
  const maker = component.numbered === 'universal' ? 'Millgate' : model.maker;
  const digits = String(1100 + at * 17);
  const makerNumber = `${maker.charAt(0)}${maker.length}-${digits}`;
  const familyClutch = takesKit(model, component);
  const clutchNumber = isKit ? CLUTCH_SUPERSESSION.newNumber : CLUTCH_SUPERSESSION.oldNumber;
  const modelNumber = `${makerNumber}-${model.model.replace(/\D/g, '')}`;
  const number = familyClutch ? clutchNumber : component.numbered === 'model' ? modelNumber : makerNumber;
  return {
    number,
    maker,
    supplier: SUPPLIERS[maker] ?? 'Harrow & Finch Jobbers',
    description: isKit ? 'KIT, ELECTRIC PTO CLUTCH' : component.descriptions[0],
    component,
    listCents: listCentsOf(component, number) + (isKit ? 900 : 0),
    isKit,
  };
}

export interface Catalog {
  partFor(model: Model, component: Component, day: number, random: Random): Part;
  rows(models: readonly Model[]): PartRow[];
}

/** `kitFromDay`: when the new clutch kit came; old stock was still used up for four months. */
export function createCatalog(kitFromDay: number): Catalog {
  const parts = new Map<string, Part>();
  const find = (model: Model, component: Component, isKit: boolean): Part => {
    const key = `${model.maker}/${model.model}/${component.name}/${isKit ? 'kit' : ''}`;
    const known = parts.get(key) ?? createPart(model, component, isKit);
    parts.set(key, known);
    return known;
  };
  return {
    partFor: (model, component, day, random) => {
      const oldStock = day < kitFromDay + 120 && random.chance(0.3);
      return find(model, component, takesKit(model, component) && day >= kitFromDay && !oldStock);
    },
    rows: (models) => {
      const byNumber = new Map<string, Part>();
      for (const model of models) {
        for (const component of COMPONENTS.filter(({ builds }) => builds.includes(model.build))) {
          for (const isKit of takesKit(model, component) ? [false, true] : [false]) {
            const part = find(model, component, isKit);
            byNumber.set(`${part.maker}/${part.number}`, part);
          }
        }
      }
      return [...byNumber.values()].map((part) => partRow(part, kitFromDay));
    },
  };
}

function partRow(part: Part, kitFromDay: number): PartRow {
  const superseded = part.number === CLUTCH_SUPERSESSION.oldNumber;
  return {
    part_number: part.number,
    maker: part.maker,
    supplier: part.supplier,
    description: part.description,
    component: part.component.name,
    system: part.component.system,
    superseded_by: superseded ? CLUTCH_SUPERSESSION.newNumber : '',
    fitment_note: part.isKit ? `${CLUTCH_SUPERSESSION.fitmentNote} (from ${dateOf(kitFromDay)})` : '',
    list_price: centsText(part.listCents),
    warranty_days: part.component.numbered === 'universal' ? '30' : '90',
  };
}
