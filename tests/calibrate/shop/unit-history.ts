import type { Link, ModelPlan, ShopPlan } from './plan';
import type { Random } from './random';
import { exponential, pick } from './random';
import type { ShopSettings } from './settings';
import type { Usage } from './usage';

export type Reason = 'failed' | 'maintenance' | 'preventive' | 'damage' | 'upgrade';
export type TrueVisit = { day: number; lines: Map<string, Reason>; links: readonly Link[] };

/** A cause not yet found: what it keeps breaking, nearest the cause first. */
type Trouble = { links: readonly Link[]; root: string; day: number; tries: number };

/** One machine's visits as they truly happened, before the records get dirty. */
export const liveUnit = (
  settings: ShopSettings,
  plan: ShopPlan,
  model: ModelPlan,
  usage: Usage,
  span: { startDay: number; endDay: number; frailty: number },
  random: Random,
): TrueVisit[] => {
  const visits = new Map<number, { lines: Map<string, Reason>; links: Set<Link> }>();
  const nextHours = new Map<string, number>();
  const renew = (component: string, atHours: number) => {
    const life = model.lives.get(component);
    if (!life) return;
    const draw = (exponential(random, 1) / span.frailty) ** (1 / life.shape) * life.scaleHours;
    const early = random() < settings.repeats ? exponential(random, 10) + 1 : Infinity;
    nextHours.set(component, atHours + Math.min(draw, early));
  };
  const replace = (day: number, component: string, reason: Reason, links: readonly Link[] = []) => {
    const visit = visits.get(day) ?? { lines: new Map<string, Reason>(), links: new Set<Link>() };
    visits.set(day, visit);
    if (!visit.lines.has(component)) visit.lines.set(component, reason);
    links.forEach((link) => visit.links.add(link));
    renew(component, usage.hoursAt(day));
    const apart = plan.changedApart.get(component);
    if (reason === 'failed' && apart && model.lives.has(apart) && random() < settings.changedApartShare) {
      if (!visit.lines.has(apart)) visit.lines.set(apart, settings.changedApartReason);
      renew(apart, usage.hoursAt(day));
    }
  };
  const linksFrom = (causal: string) =>
    plan.links.filter((link) => link.causal === causal && link.models.has(model.model));
  const takenBy = (root: string): Link[] =>
    linksFrom(root)
      .filter((link) => random() < link.holds)
      .flatMap((link) => [link, ...takenBy(link.resultant)]);

  const troubles: Trouble[] = [];
  /** A visit for a trouble: broken results are replaced; the search goes up the chain until it stops or finds the root. */
  const attend = (trouble: Trouble) => {
    const { links, root, day } = trouble;
    const first = links[0];
    if (!first) return;
    const isFound = (link: Link) => trouble.tries >= 4 || random() < link.foundFirst;
    const found = new Set(links.filter(isFound).map((link) => link.causal));
    const rootFound = links.some((link) => link.causal === root && found.has(root));
    for (const link of links) {
      const isLeaf = !links.some((other) => other.causal === link.resultant);
      const isSeen = isLeaf || found.has(link.resultant) || rootFound;
      if (!isSeen) continue;
      if (rootFound && trouble.tries > 0 && random() >= settings.cureWithResultant) continue;
      replace(day, link.resultant, rootFound && random() < settings.codedDamage ? 'damage' : 'failed', links);
    }
    if (rootFound) replace(day, root, 'failed', links);
    else {
      const back = day + 1 + Math.round(exponential(random, first.returnDays));
      troubles.push({ ...trouble, day: back, tries: trouble.tries + 1 });
    }
  };

  model.lives.forEach((_, component) => {
    renew(component, 0);
  });
  const serviceGap = settings.servicesPerYear > 0 ? 365 / settings.servicesPerYear : Infinity;
  let serviceDay = span.startDay + random() * serviceGap;
  for (;;) {
    const [component, hours] = [...nextHours].reduce((a, b) => (b[1] < a[1] ? b : a));
    const failDay = usage.dayAt(hours);
    const trouble = troubles.reduce<Trouble | undefined>((a, b) => (a && a.day <= b.day ? a : b), undefined);
    const day = Math.min(failDay, trouble?.day ?? Infinity, serviceDay);
    if (day > span.endDay) break;
    if (day === trouble?.day) {
      troubles.splice(troubles.indexOf(trouble), 1);
      attend(trouble);
    } else if (day === failDay) {
      const links = takenBy(component);
      if (links.length === 0) replace(failDay, component, 'failed');
      else {
        // The cause has failed but stays in the machine until it is found.
        nextHours.set(component, Infinity);
        attend({ links, root: component, day: failDay, tries: 0 });
      }
    } else {
      const whole = Math.round(serviceDay);
      const now = usage.hoursAt(whole);
      for (const item of plan.serviceItems) if (model.lives.has(item)) replace(whole, item, 'maintenance');
      for (const [part, at] of nextHours)
        if (at - now < settings.serviceSeesHours && random() < settings.serviceSees)
          replace(whole, part, pick(random, ['preventive', 'maintenance'] as const));
      serviceDay += serviceGap * (0.8 + 0.4 * random());
    }
  }
  return [...visits]
    .map(([day, visit]) => ({ day, lines: visit.lines, links: [...visit.links] }))
    .sort((a, b) => a.day - b.day);
};
