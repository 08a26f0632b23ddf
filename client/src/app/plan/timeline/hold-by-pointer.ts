import { createDragRef, type DragRef, type Point } from '@angular/cdk/drag-drop';
import { DestroyRef, Directive, effect, ElementRef, inject, Injector, input, output } from '@angular/core';

/** Where the hand is on the screen, and how far it has come since it took hold. */
export interface HandPoint {
  readonly clientX: number;
  readonly clientY: number;
  /** Pixels from the left edge of what is held to where it was taken. */
  readonly gripX: number;
  readonly gripY: number;
}

/** How long a finger rests on a tape before it holds it; less is a scroll. */
const TOUCH_REST_MS = 320;

/**
 * Lets a pointer take hold of an element without moving it: the drag engine follows mouse and finger, and whoever listens draws
 * what is in the hand. The element stays where it is, as the place to come back to.
 */
@Directive({ selector: '[fettleHoldByPointer]' })
export class HoldByPointer {
  private readonly drag: DragRef;
  private readonly element = inject<ElementRef<HTMLElement>>(ElementRef);
  private grip: Point = { x: 0, y: 0 };
  private latest: Point = { x: 0, y: 0 };

  /** Whether this can be taken hold of at all. */
  readonly canHold = input(true);
  readonly taken = output<HandPoint>();
  readonly moved = output<HandPoint>();
  readonly released = output();

  constructor() {
    this.drag = createDragRef(inject(Injector), this.element);
    this.drag.dragStartDelay = { mouse: 0, touch: TOUCH_REST_MS };
    // The engine asks where the element's corner shall be for a pointer; the answer is always where it was.
    this.drag.constrainPosition = (pointer, _drag, box) => {
      this.latest = pointer;
      return { x: box.left, y: box.top };
    };
    this.drag.started.subscribe(({ event }) => this.begin(event));
    this.drag.moved.subscribe(() => this.moved.emit(this.point()));
    this.drag.ended.subscribe(() => {
      this.drag.reset();
      this.released.emit();
    });
    effect(() => (this.drag.disabled = !this.canHold()));
    inject(DestroyRef).onDestroy(() => this.drag.dispose());
  }

  private begin(event: MouseEvent | TouchEvent): void {
    const { clientX, clientY } = 'touches' in event ? event.touches[0] : event;
    const box = this.element.nativeElement.getBoundingClientRect();
    this.latest = { x: clientX, y: clientY };
    this.grip = { x: clientX - box.left, y: clientY - box.top };
    this.taken.emit(this.point());
  }

  private point(): HandPoint {
    return { clientX: this.latest.x, clientY: this.latest.y, gripX: this.grip.x, gripY: this.grip.y };
  }
}
