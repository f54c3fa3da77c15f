import type { ReactNode } from 'react';
import type { UnitWhole } from '../../../shared/machines';
import { Sheet } from '../../components/ui/sheet';
import type { Formats } from '../../lib/format';

const IDENTITY: Record<UnitWhole['identity'], string> = {
  serial: 'by its serial number',
  tag: 'by the shop’s own tag',
  customer_model: 'by customer and model, as a person confirmed',
};

type Props = { unit: UnitWhole; formats: Formats };

/** What the records say of the machine itself. */
export function UnitFacts({ unit, formats }: Props) {
  const { customer, serial, unitRef, inServiceOn, useClass, knownFromOn, isRegistered, engines } = unit;
  return (
    <Sheet title="The machine">
      <dl className="grid grid-cols-[auto_1fr] gap-x-4 gap-y-1 text-table">
        <Fact name="Serial" value={serial} />
        <Fact name="Tag" value={unitRef} />
        <Fact name="Known" value={IDENTITY[unit.identity]} />
        <Fact name="In service" value={inServiceOn && formats.day(inServiceOn)} />
        <Fact name="Use" value={useClass} />
        <Fact
          name="Repairs seen"
          value={
            knownFromOn && `from ${formats.day(knownFromOn)}${isRegistered ? ', as the register says' : ''}`
          }
        />
        {engines.map(({ name, seenFromOn }) => (
          <Fact
            key={`${name} ${seenFromOn}`}
            name="Engine"
            value={`${name}${seenFromOn ? `, seen from ${formats.day(seenFromOn)}` : ''}`}
          />
        ))}
        <Fact
          name="Customer"
          value={customer && [customer.name ?? customer.ref, customer.phone].filter(Boolean).join(', ')}
        />
      </dl>
    </Sheet>
  );
}

function Fact({ name, value }: { name: string; value: ReactNode }) {
  if (!value) return null;
  return (
    <>
      <dt className="text-dim">{name}</dt>
      <dd>{value}</dd>
    </>
  );
}
