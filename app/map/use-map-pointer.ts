import { useEffect, useRef, type PointerEvent, type RefObject } from 'react';
import type { ScreenPoint } from './map-view.ts';

export interface MapPointerActions {
  readonly zoom: (at: ScreenPoint, factor: number) => void;
  readonly pan: (right: number, down: number) => void;
  readonly hover: (at: ScreenPoint | undefined, shift: boolean) => void;
  /** Pressed and let go in one place. */
  readonly click: (at: ScreenPoint, shift: boolean) => void;
  readonly doubleClick: (at: ScreenPoint, shift: boolean) => void;
  /** Whether a drag that begins here is not to move the map; if so, `drag` follows it and `drop` ends it. */
  readonly grab: (at: ScreenPoint, shift: boolean) => boolean;
  readonly drag: (at: ScreenPoint, shift: boolean) => void;
  /** `undefined`: the drag was broken off. */
  readonly drop: (at: ScreenPoint | undefined, shift: boolean) => void;
}

type Gesture = 'pressed' | 'pan' | 'drag' | 'pinch' | undefined;
/** A press that moves less than this, px, is a click. */
const still = 5;

/** Mouse, pen and fingers on the map: drag, wheel, pinch, click, double click, and dragging of what is on it. */
export function useMapPointer(element: RefObject<HTMLElement | null>, actions: MapPointerActions) {
  const latest = useRef(actions);
  useEffect(() => {
    latest.current = actions;
  });
  const pointers = useRef(new Map<number, ScreenPoint>());
  const gesture = useRef<Gesture>(undefined);
  const pressedAt = useRef<ScreenPoint>({ left: 0, top: 0 });
  const grabbed = useRef(false);

  const place = (event: { clientX: number; clientY: number }): ScreenPoint => {
    const box = element.current?.getBoundingClientRect();
    return { left: event.clientX - (box?.left ?? 0), top: event.clientY - (box?.top ?? 0) };
  };

  useEffect(() => {
    const node = element.current;
    if (!node) return;
    // React listens to wheels passively, and then the page would scroll along.
    const wheel = (event: WheelEvent) => {
      event.preventDefault();
      const lines = event.deltaMode === WheelEvent.DOM_DELTA_LINE ? 16 : 1;
      const box = node.getBoundingClientRect();
      const at = { left: event.clientX - box.left, top: event.clientY - box.top };
      const speed = event.ctrlKey ? 0.01 : 0.0018;
      latest.current.zoom(at, Math.exp(-Math.max(-300, Math.min(300, event.deltaY * lines)) * speed));
    };
    node.addEventListener('wheel', wheel, { passive: false });
    return () => {
      node.removeEventListener('wheel', wheel);
    };
  }, [element]);

  const apart = () => {
    const [a, b] = [...pointers.current.values()];
    return {
      distance: Math.hypot(a.left - b.left, a.top - b.top),
      left: (a.left + b.left) / 2,
      top: (a.top + b.top) / 2,
    };
  };

  const onPointerDown = (event: PointerEvent<HTMLElement>) => {
    if (event.pointerType === 'mouse' && event.button !== 0 && event.button !== 1) return;
    const at = place(event);
    event.currentTarget.setPointerCapture(event.pointerId);
    pointers.current.set(event.pointerId, at);
    if (pointers.current.size === 2) {
      if (gesture.current === 'drag') latest.current.drop(undefined, event.shiftKey);
      gesture.current = 'pinch';
    } else if (pointers.current.size === 1) {
      gesture.current = 'pressed';
      pressedAt.current = at;
      grabbed.current = event.button === 0 && latest.current.grab(at, event.shiftKey);
    }
  };
  const onPointerMove = (event: PointerEvent<HTMLElement>) => {
    const at = place(event);
    const before = pointers.current.get(event.pointerId);
    if (!before) {
      latest.current.hover(at, event.shiftKey);
      return;
    }
    if (gesture.current === 'pinch' && pointers.current.size === 2) {
      const was = apart();
      pointers.current.set(event.pointerId, at);
      const is = apart();
      latest.current.pan(is.left - was.left, is.top - was.top);
      if (was.distance > 0) latest.current.zoom(is, is.distance / was.distance);
      return;
    }
    pointers.current.set(event.pointerId, at);
    if (
      gesture.current === 'pressed' &&
      Math.hypot(at.left - pressedAt.current.left, at.top - pressedAt.current.top) >= still
    )
      gesture.current = grabbed.current ? 'drag' : 'pan';
    if (gesture.current === 'drag') latest.current.drag(at, event.shiftKey);
    if (gesture.current === 'pan') latest.current.pan(at.left - before.left, at.top - before.top);
    latest.current.hover(at, event.shiftKey);
  };
  const finish = (event: PointerEvent<HTMLElement>, kept: boolean) => {
    if (!pointers.current.delete(event.pointerId)) return;
    const at = place(event);
    if (gesture.current === 'drag') latest.current.drop(kept ? at : undefined, event.shiftKey);
    if (gesture.current === 'pressed' && kept && event.button === 0) latest.current.click(at, event.shiftKey);
    // After a pinch the finger that stays goes on moving the map, and lifts without a click.
    gesture.current = gesture.current === 'pinch' && pointers.current.size === 1 ? 'pan' : undefined;
  };

  return {
    onPointerDown,
    onPointerMove,
    onPointerUp: (event: PointerEvent<HTMLElement>) => {
      finish(event, true);
    },
    onPointerCancel: (event: PointerEvent<HTMLElement>) => {
      finish(event, false);
    },
    onPointerLeave: () => {
      latest.current.hover(undefined, false);
    },
    onDoubleClick: (event: { clientX: number; clientY: number; shiftKey: boolean }) => {
      latest.current.doubleClick(place(event), event.shiftKey);
    },
  };
}
