import { Link } from 'react-router';
import type { MonthReview } from '../../../shared/reports';
import { Sheet } from '../../components/ui/sheet';

/** What waits for somebody today. */
export function NeedsDoing({ todos }: { todos: MonthReview['todos'] }) {
  return (
    <Sheet title="Needs doing">
      {todos.length === 0 ? (
        <p className="text-dim">Nothing waits.</p>
      ) : (
        <ul className="-mt-1">
          {todos.map((todo) => (
            <li
              key={`${todo.kind} ${todo.path}`}
              className="border-t border-rule py-2 first:border-t-0 last:pb-0"
            >
              <Link to={todo.path} className="inline-flex min-h-11 items-center desk:min-h-0">
                {todo.text}
              </Link>
              {todo.detail && <p className="text-sm text-dim">{todo.detail}</p>}
            </li>
          ))}
        </ul>
      )}
    </Sheet>
  );
}
