import { ComponentHarness } from '@angular/cdk/testing';

abstract class PartHarness extends ComponentHarness {
  async text(): Promise<string> {
    return (await this.host()).text();
  }
}

/** Reads a mark chip. */
export class MarkChipHarness extends PartHarness {
  static readonly hostSelector = 'fettle-mark-chip';

  private readonly letters = this.locatorFor('span');

  /** Whether a screen reader passes over it. */
  async isDecorative(): Promise<boolean> {
    return (await (await this.letters()).getAttribute('aria-hidden')) === 'true';
  }
}

/** Reads a notice. */
export class NoticeHarness extends PartHarness {
  static readonly hostSelector = 'fettle-notice';

  async role(): Promise<string | null> {
    return (await this.host()).getAttribute('role');
  }
}

/** Reads a moment. */
export class MomentHarness extends PartHarness {
  static readonly hostSelector = 'fettle-moment';

  private readonly time = this.locatorFor('time');

  /** The instant for machines. */
  async instant(): Promise<string | null> {
    return (await this.time()).getAttribute('datetime');
  }
}

/** Reads a page heading. */
export class PageHeadingHarness extends PartHarness {
  static readonly hostSelector = 'fettle-page-heading';

  async title(): Promise<string> {
    return (await this.locatorFor('h1')()).text();
  }
}

/** Reads a week strip. */
export class WeekStripHarness extends PartHarness {
  static readonly hostSelector = 'fettle-week-strip';

  /** What each of the seven days says. */
  async days(): Promise<readonly string[]> {
    const days = await this.locatorForAll('li')();
    return Promise.all(days.map(async (day) => (await day.text()).replace(/\s+/g, ' ').trim()));
  }
}
