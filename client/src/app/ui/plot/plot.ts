import { MediaMatcher } from '@angular/cdk/layout';
import {
  ChangeDetectionStrategy,
  Component,
  computed,
  DestroyRef,
  ElementRef,
  inject,
  input,
  signal,
} from '@angular/core';
import type { EChartsCoreOption } from 'echarts/core';
import { NgxEchartsDirective, provideEchartsCore } from 'ngx-echarts';

/** The identity's colours as a plot takes them, in the theme that is on. */
export interface PlotInk {
  readonly ink: string;
  readonly graphite: string;
  readonly rule: string;
  readonly gesso: string;
  readonly silicone: string;
  readonly oxide: string;
  readonly verdigris: string;
  readonly resin: string;
}

const TOKENS = ['ink', 'graphite', 'rule', 'gesso', 'silicone', 'oxide', 'verdigris', 'resin'] as const;

/**
 * A plot for the eye. What it shows has to stand in a table or a sentence beside it as well; `label` says in a sentence what it is
 * of. `draw` is given the theme's colours and answers with what to plot; it is asked again when the theme changes.
 */
@Component({
  selector: 'fettle-plot',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [NgxEchartsDirective],
  providers: [provideEchartsCore({ echarts: () => import('./plot-parts').then((file) => ({ ...file.default })) })],
  template: `<div echarts class="sheet" role="img" [attr.aria-label]="label()" [options]="options()"></div>`,
  styles: `
    :host {
      display: block;
      /* The picture is drawn as wide as its place, a moment after: until then it must not hold the place open. */
      contain: inline-size;
      overflow: clip;
    }
    .sheet {
      width: 100%;
      height: var(--plot-height, 15rem);
    }
  `,
})
export class Plot {
  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef);
  private readonly themes = signal(0);

  readonly label = input.required<string>();
  readonly draw = input.required<(ink: PlotInk) => EChartsCoreOption>();

  protected readonly options = computed(() => {
    this.themes();
    return { animation: false, textStyle: { fontFamily: 'Work Sans, sans-serif' }, ...this.draw()(this.readInk()) };
  });

  constructor() {
    const again = (): void => this.themes.update((count) => count + 1);
    const device = inject(MediaMatcher).matchMedia('(prefers-color-scheme: dark)');
    device.addEventListener('change', again);
    const chosen = new MutationObserver(again);
    chosen.observe(document.documentElement, { attributeFilter: ['data-appearance'] });
    inject(DestroyRef).onDestroy(() => {
      device.removeEventListener('change', again);
      chosen.disconnect();
    });
  }

  /** The tokens follow the theme by a function of CSS, so that only a computed colour says what they come to. */
  private readInk(): PlotInk {
    const probe = document.createElement('i');
    this.host.nativeElement.append(probe);
    const colours = TOKENS.map((token) => {
      probe.style.color = `var(--${token})`;
      return [token, getComputedStyle(probe).color] as const;
    });
    probe.remove();
    return Object.fromEntries(colours) as unknown as PlotInk;
  }
}
