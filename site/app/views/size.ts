/** The room an element has, so that a drawing is made in true pixels and its letters keep their size. */
import type { RefObject } from "preact";
import { useLayoutEffect, useRef, useState } from "preact/hooks";

export interface Size {
  readonly width: number;
  readonly height: number;
}

export function useSize<E extends HTMLElement>(): [RefObject<E | null>, Size] {
  const element = useRef<E | null>(null);
  const [size, setSize] = useState<Size>({ width: 0, height: 0 });
  useLayoutEffect(() => {
    const box = element.current;
    if (box === null) return undefined;
    const measure = () => {
      const { clientWidth: width, clientHeight: height } = box;
      setSize((old) => (old.width === width && old.height === height ? old : { width, height }));
    };
    measure();
    const observer = new ResizeObserver(measure);
    observer.observe(box);
    return () => observer.disconnect();
  }, []);
  return [element, size];
}
