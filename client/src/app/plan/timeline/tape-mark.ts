import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { hueColour } from '../../ui/production-hues';
import { sayTapeName } from '../wording/say-stage';
import type { LaidTape } from './engine/board-layout';
import { drawTape } from './engine/draw-tape';
import type { StageFace } from './engine/stage-face';
import { labelFor } from './engine/tape-label';
import type { TimeScale } from './engine/time-scale';

/** Which of its two names a stage goes by: a piece's own row need not repeat the piece. */
export type NamedBy = 'stage' | 'piece-and-stage';

/** A stage as tape on the wall: its drawing, its mark, its name where there is room, a nail where it is held. */
@Component({
  // An attribute, so that the wall may hang it as a button, as a ghost or in the hand.
  selector: '[fettleTape]',
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './tape-mark.html',
  styleUrl: './tape-mark.scss',
  host: {
    class: 'tape',
    '[class.paper]': "face().kind === 'sign-off'",
    '[class.tentative]': 'face().tentative',
    '[class.finished]': "face().progress === 'finished'",
    '[class.started]': "face().progress === 'started'",
    '[class.frozen]': 'face().frozen',
    '[style.left.px]': 'laid().x',
    '[style.top.px]': 'top()',
    '[style.width.px]': 'laid().width',
    '[style.--hue]': 'hue()',
    '[style.--hue-on]': 'hueOn()',
    '[style.--hue-wash]': 'hueWash()',
  },
})
export class TapeMark {
  readonly laid = input.required<LaidTape>();
  readonly face = input.required<StageFace>();
  readonly scale = input.required<TimeScale>();
  readonly drawn = input.required<{ readonly left: number; readonly right: number }>();
  /** Pixels from the top of whatever it hangs in. */
  readonly top = input.required<number>();
  readonly namedBy = input<NamedBy>('stage');

  protected readonly hue = computed(() => hueColour(this.face().hue));
  protected readonly hueOn = computed(() => hueColour(this.face().hue, 'on'));
  protected readonly hueWash = computed(() => hueColour(this.face().hue, 'wash'));
  protected readonly drawing = computed(() =>
    drawTape({ tape: this.laid().tape, kind: this.face().kind, scale: this.scale(), drawn: this.drawn() }),
  );
  protected readonly name = computed(() => sayTapeName(this.face(), this.namedBy()));
  protected readonly label = computed(() => {
    const { bodyWidth, dwellWidth } = this.drawing();
    const roomAfter = this.laid().room - this.laid().width;
    return labelFor({ bodyWidth, dwellWidth, roomAfter, nameLength: this.name().length });
  });
  /** Where the name begins that stands off the work; null where none does. */
  protected readonly offX = computed(() => {
    const { name } = this.label();
    if (name === 'beside') return this.laid().width + 3;
    return name === 'over-dwell' ? this.drawing().workEndX + 8 : null;
  });
}
