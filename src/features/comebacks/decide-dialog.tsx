import { useState } from 'react';
import { Link } from 'react-router';
import type { Comeback } from '../../../shared/comebacks';
import { Button } from '../../components/ui/button';
import { Dialog } from '../../components/ui/dialog';
import { Field } from '../../components/ui/field';
import { Segmented } from '../../components/ui/segmented';
import { Select } from '../../components/ui/select';
import { TextArea } from '../../components/ui/text-input';
import type { Formats } from '../../lib/format';
import { paths } from '../../paths';
import { isCounted, isReason, oursByReason, reasonAbout, reasonOptions, reasonWords } from './comeback-words';
import { useDecide, type Decision } from './queries';

type Props = { comeback: Comeback; onClose: () => void; formats: Formats };

/** One comeback: was it the same trouble, why, and whose doing. */
export function DecideDialog({ comeback, onClose, formats }: Props) {
  const { id, status, suggestedReason, firstRepairNumber, repairNumber, days } = comeback;
  const [isSame, setSame] = useState<'yes' | 'no'>(status === 'dismissed' ? 'no' : 'yes');
  const [reason, setReason] = useState(comeback.reason ?? suggestedReason);
  const [isOurs, setOurs] = useState<'yes' | 'no'>(comeback.isOurs ? 'yes' : 'no');
  const [note, setNote] = useState(comeback.note);
  const decide = useDecide('What you said of it is kept, and counts at once.');
  const byReason = oursByReason(reason);
  const send = (decision: Decision) => decide.mutate({ id, decision }, { onSuccess: onClose });
  const save = () =>
    send(
      isSame === 'yes'
        ? {
            status: 'confirmed',
            reason,
            isOurs: byReason === null ? isOurs === 'yes' : null,
            note: note.trim(),
          }
        : { status: 'dismissed', reason: null, isOurs: null, note: note.trim() },
    );

  return (
    <Dialog
      isOpen
      onClose={onClose}
      title={`${repairNumber}, ${days === 0 ? 'before' : `${formats.days(days)} after`} ${firstRepairNumber}`}
      description={comeback.complaint ? `“${comeback.complaint}”` : 'No complaint was written.'}
    >
      <form
        className="flex flex-col gap-4"
        onSubmit={(event) => {
          event.preventDefault();
          save();
        }}
      >
        <div className="border-l-2 border-rule pl-3 text-table">
          <p>
            It seems: <strong className="font-heading">{reasonWords(suggestedReason)}</strong>
          </p>
          <p className="text-dim">{comeback.evidence}</p>
          <p className="mt-1 flex flex-wrap gap-x-4">
            <Link to={paths.repair(comeback.firstRepairId)}>Read {firstRepairNumber}</Link>
            <Link to={paths.repair(comeback.repairId)}>Read {repairNumber}</Link>
          </p>
        </div>
        <Segmented
          label="Was it the same trouble?"
          value={isSame}
          onChange={setSame}
          options={[
            { value: 'yes', label: 'The same trouble' },
            { value: 'no', label: 'Not the same: put it aside' },
          ]}
        />
        {isSame === 'yes' && (
          <>
            <Field label="Why it came back" hint={reasonAbout(reason)}>
              {(control) => (
                <Select
                  {...control}
                  value={reason}
                  onChange={(next) => isReason(next) && setReason(next)}
                  options={reasonOptions}
                />
              )}
            </Field>
            {byReason === null ? (
              <div className="flex flex-col gap-1">
                <p className="text-table font-label">Was it our doing?</p>
                <Segmented
                  label="Was it our doing?"
                  value={isOurs}
                  onChange={setOurs}
                  options={[
                    { value: 'no', label: 'No' },
                    { value: 'yes', label: 'Yes, ours' },
                  ]}
                />
              </div>
            ) : (
              <p className="text-table text-dim">
                {byReason
                  ? 'With this reason it counts as ours.'
                  : isCounted(reason)
                    ? 'With this reason it counts as a comeback, not as ours.'
                    : 'With this reason it is not counted.'}
              </p>
            )}
          </>
        )}
        <Field label="Note">
          {(control) => (
            <TextArea
              {...control}
              rows={2}
              maxLength={2000}
              value={note}
              onChange={(event) => setNote(event.target.value)}
            />
          )}
        </Field>
        {decide.error && (
          <p role="alert" className="text-sm text-oxide">
            {decide.error.message}
          </p>
        )}
        <div className="flex flex-wrap justify-end gap-3">
          {status !== 'suggested' && (
            <Button
              className="mr-auto"
              isBusy={decide.isPending}
              onClick={() => send({ status: 'suggested', reason: null, isOurs: null })}
            >
              Take it back: to look at
            </Button>
          )}
          <Button onClick={onClose}>Not now</Button>
          <Button type="submit" look="primary" isBusy={decide.isPending}>
            {isSame === 'yes' ? 'Confirm' : 'Put aside'}
          </Button>
        </div>
      </form>
    </Dialog>
  );
}
