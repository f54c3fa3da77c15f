export type Toast = { id: number; text: string; tone: 'done' | 'failed' };

let toasts: readonly Toast[] = [];
let lastId = 0;
const listeners = new Set<() => void>();

function publish(next: readonly Toast[]): void {
  toasts = next;
  for (const listener of listeners) listener();
}

/** Says in a corner what has just been done, or has failed. */
export function notify(text: string, tone: Toast['tone'] = 'done'): void {
  lastId += 1;
  publish([...toasts.slice(-2), { id: lastId, text, tone }]);
}

export function dismissToast(id: number): void {
  publish(toasts.filter((toast) => toast.id !== id));
}

export const toastStore = {
  subscribe: (listener: () => void) => {
    listeners.add(listener);
    return () => listeners.delete(listener);
  },
  read: () => toasts,
};
