import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import type { Rule } from './engine/rule-marks';

/** The rule at the head of the wall: graduations and what is written between them. For the eye; times are told with each stage. */
@Component({
  selector: 'fettle-rule-head',
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './rule-head.html',
  styleUrl: './rule-head.scss',
  host: { 'aria-hidden': 'true' },
})
export class RuleHead {
  readonly rule = input.required<Rule>();
}
