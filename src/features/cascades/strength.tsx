import { Link } from 'react-router';
import type { FindingWhole } from '../../../shared/findings';
import { HowComputed } from '../../components/ui/how-computed';
import { Sheet } from '../../components/ui/sheet';
import type { Formats } from '../../lib/format';
import { paths } from '../../paths';
import { strengthRows } from './strength-rows';

type Props = { finding: FindingWhole; windowDays: number; formats: Formats };

/** Every count behind the finding, and what each says. */
export function Strength({ finding, windowDays, formats }: Props) {
  return (
    <Sheet title="How strong is it" actions={<HowComputed anchor="cascade" />}>
      <table className="w-full border-collapse text-table">
        <caption className="sr-only">How strong is it</caption>
        <thead className="max-desk:sr-only">
          <tr className="text-left text-dim">
            {['Question', 'Counted', 'What it says'].map((header) => (
              <th key={header} scope="col" className="border-b border-rule py-1.5 pr-4 font-label">
                {header}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {strengthRows(finding, windowDays, formats).map(({ id, question, counts, answer }) => (
            // On a phone a row is read from top to bottom.
            <tr
              key={id}
              className="border-b border-rule align-top last:border-b-0 max-desk:block max-desk:py-2"
            >
              <th
                scope="row"
                className="py-2 pr-4 text-left font-text text-dim max-desk:block max-desk:py-0 desk:w-[32%] desk:text-ink"
              >
                {question}
              </th>
              <td className="py-2 pr-4 max-desk:block max-desk:py-1 desk:w-[30%]">{counts}</td>
              <td className="py-2 max-desk:block max-desk:py-0">{answer}</td>
            </tr>
          ))}
        </tbody>
      </table>
      {finding.borrowedFrom.length > 0 && (
        <p className="mt-3 text-sm text-dim">
          The same pair is seen on{' '}
          {finding.borrowedFrom.map(({ id, name }, index) => (
            <span key={id}>
              {index > 0 && ', '}
              <Link to={paths.model(id)}>{name}</Link>
            </span>
          ))}
          : their records lent this one strength. The counts above are this model’s own.
        </p>
      )}
    </Sheet>
  );
}
