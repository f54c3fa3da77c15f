import { useCallback, useState } from 'react';

/** The width that a drawing of our own has, from the element that its ref is put on. */
export function useWidth(initialPx: number): [(element: HTMLElement | null) => () => void, number] {
  const [widthPx, setWidthPx] = useState(initialPx);
  const ref = useCallback((element: HTMLElement | null) => {
    const observer = new ResizeObserver(([entry]) => {
      if (entry && entry.contentRect.width > 0) setWidthPx(Math.floor(entry.contentRect.width));
    });
    if (element) observer.observe(element);
    return () => observer.disconnect();
  }, []);
  return [ref, widthPx];
}
