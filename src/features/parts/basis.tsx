import type { ReactNode } from 'react';
import type { PartLife } from '../../../shared/parts';
import type { HelpAnchor } from '../../help-anchors';
import { HowComputed } from '../../components/ui/how-computed';
import { Segmented } from '../../components/ui/segmented';
import { Sheet } from '../../components/ui/sheet';
import { Checkbox } from '../../components/ui/text-input';
import type { Formats } from '../../lib/format';
import type { LifeAddress } from './life-filters';

type Props = {
  life: PartLife;
  address: LifeAddress;
  choose: (changes: Record<string, string | undefined>) => void;
  formats: Formats;
};

const REASONS = [
  { value: 'known', label: 'left out' },
  { value: 'allFailed', label: 'as failed' },
  { value: 'noneFailed', label: 'as good' },
] as const;

/** What the figures rest on; what could be counted otherwise is changed where it is said. */
export function Basis({ life, address, choose, formats }: Props) {
  const {
    lives,
    failures,
    withHours,
    unknown,
    damaged,
    setAside,
    betweenReadings,
    assumedOriginal,
    numbers,
  } = life;
  const seen = lives + (address.reasons === undefined ? unknown : 0) + setAside;
  return (
    <Sheet title="What it rests on">
      <dl className="flex flex-col gap-3 text-table">
        <Line label="Followed">
          {formats.counted(lives, 'part')}: {formats.count(failures)} failed,{' '}
          {formats.count(lives - failures)} were running or sound when last seen
          {damaged > 0 && <>, {formats.count(damaged)} of these broken by another part</>}.
        </Line>
        <Line label="Hours" how="clocks">
          {formats.count(withHours)} of {formats.count(seen)} have hours
          {life.clockReason === 'few_hours' && '; too few, so that months are used'}.
          {betweenReadings > 0 && (
            <>
              {' '}
              For {formats.count(betweenReadings)} the hours of one end were not read and lie between the
              machine’s readings before and after.
            </>
          )}
          {setAside > 0 && <> {formats.count(setAside)} have no usable age and are left out.</>}
        </Line>
        {(unknown > 0 || address.reasons !== undefined) && (
          <Line label="Reason not written down" how="unknown-reasons">
            {formats.counted(unknown, 'replacement')}; the truth lies between “as failed” and “as good”.
            <div className="mt-1.5">
              <Segmented
                label="Replacements without a reason count"
                value={address.reasons ?? 'known'}
                onChange={(value) => choose({ reasons: value === 'known' ? undefined : value })}
                options={REASONS}
              />
            </div>
          </Line>
        )}
        {(assumedOriginal > 0 || address.assumedOriginal) && (
          <Line label="Past not known" how="assumed-original">
            {formats.counted(assumedOriginal, 'machine')} came with one already in it.
            <Checkbox
              label="take these for the original parts"
              checked={address.assumedOriginal === 'true'}
              onChange={(event) => choose({ original: event.target.checked ? 'true' : undefined })}
            />
          </Line>
        )}
        {life.amongThoseThatCameIn && (
          <Line label="Machines" how="machines">
            Most were only seen because something failed: the figure holds among machines that came in, and
            makes the part look worse than it is.
          </Line>
        )}
        {numbers.length > 1 && address.partNumbers === undefined && (
          <Line label="Part numbers" how="old-and-new-numbers">
            <div className="mt-1">
              <Segmented
                label="Part numbers"
                value={address.isApart ? 'apart' : 'pooled'}
                onChange={(value) => choose({ numbers: value === 'apart' ? 'apart' : undefined })}
                options={[
                  { value: 'pooled', label: 'together' },
                  { value: 'apart', label: 'each apart' },
                ]}
              />
            </div>
          </Line>
        )}
      </dl>
      {life.asOf && <p className="mt-3 text-xs text-dim">Records up to {formats.day(life.asOf)}.</p>}
    </Sheet>
  );
}

function Line({ label, how, children }: { label: string; how?: HelpAnchor; children: ReactNode }) {
  return (
    <div>
      <dt className="flex justify-between gap-2 text-sm text-dim">
        {label}
        {how && <HowComputed anchor={how}>how</HowComputed>}
      </dt>
      <dd>{children}</dd>
    </div>
  );
}
