import { ComponentHarness, type TestElement, type TestKey } from '@angular/cdk/testing';

/** Works the wall as a person at the keyboard would. */
export class TimelineHarness extends ComponentHarness {
  static readonly hostSelector = 'fettle-timeline';

  private readonly tapes = this.locatorForAll('button.tape');

  /** What each stage on show is called, in the order of the page. */
  async stageNames(): Promise<string[]> {
    const tapes = await this.tapes();
    return Promise.all(tapes.map(async (tape) => (await tape.getAttribute('aria-label')) ?? ''));
  }

  /** How many stages Tab reaches. */
  async tabStops(): Promise<number> {
    const tapes = await this.tapes();
    const indices = await Promise.all(tapes.map((tape) => tape.getAttribute('tabindex')));
    return indices.filter((index) => index === '0').length;
  }

  /** Clicks the first stage whose name begins so. */
  async openStage(name: string): Promise<void> {
    await (await this.stage(name)).click();
  }

  /** Puts the focus on the first stage whose name begins so. */
  async focusStage(name: string): Promise<void> {
    await (await this.stage(name)).focus();
  }

  /** Presses keys on the stage that has the focus. */
  async press(...keys: readonly (TestKey | string)[]): Promise<void> {
    const focused = await this.focused();
    if (!focused) throw new Error('No stage has the focus.');
    for (const key of keys) await focused.sendKeys(key);
  }

  /** Presses a key together with Shift. */
  async pressWithShift(key: TestKey): Promise<void> {
    await (await this.focused())?.sendKeys({ shift: true }, key);
  }

  /** What the stage with the focus is called; null where none has it. */
  async focusedName(): Promise<string | null> {
    return (await this.focused())?.getAttribute('aria-label') ?? null;
  }

  /** How many ghosts are on the wall. */
  async ghosts(): Promise<number> {
    return (await this.locatorForAll('.ghost')()).length;
  }

  private async focused(): Promise<TestElement | null> {
    for (const tape of await this.tapes()) if (await tape.isFocused()) return tape;
    return null;
  }

  private async stage(name: string): Promise<TestElement> {
    for (const tape of await this.tapes()) {
      if ((await tape.getAttribute('aria-label'))?.startsWith(name)) return tape;
    }
    throw new Error(`No stage on show is called “${name}”.`);
  }
}
