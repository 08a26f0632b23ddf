import { type LaidTape, LEAST_TAPE_WIDTH, TAPE_HEIGHT } from './engine/board-layout';

/** Scrolls the wall just far enough that a tape's beginning is in its window, beside and below the heads, in pixels. */
export function scrollToTape(
  wall: HTMLElement,
  laid: LaidTape,
  heads: { readonly width: number; readonly height: number },
): void {
  const room = Math.max(100, wall.clientWidth - heads.width);
  const height = wall.clientHeight - heads.height;
  const grip = Math.min(laid.width, room / 2);
  if (laid.x < wall.scrollLeft + LEAST_TAPE_WIDTH) wall.scrollLeft = Math.max(0, laid.x - 60);
  else if (laid.x + grip > wall.scrollLeft + room) wall.scrollLeft = laid.x + grip - room + 80;
  if (laid.y < wall.scrollTop) wall.scrollTop = Math.max(0, laid.y - 40);
  else if (laid.y + TAPE_HEIGHT > wall.scrollTop + height) wall.scrollTop = laid.y + TAPE_HEIGHT - height + 40;
}
