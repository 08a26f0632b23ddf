import { computed, inject, Injectable, signal } from '@angular/core';
import { endpoints, type PieceView, type StageLink, type StageView } from '@common/contract';
import { Api, readEndpoint, reloadOnChange } from '../api';
import { Confirm } from '../ui/confirm';
import { Toasts } from '../ui/toasts';
import { stageTitle } from './words';

/** A piece with its stages in order. */
export interface PieceWithStages {
  readonly piece: PieceView;
  readonly stages: readonly StageView[];
  readonly finished: number;
  readonly handsOnMinutes: number;
}

/** One production with all that is said of it, and what its stages name. Provided by the page that shows it. */
@Injectable()
export class ProductionStore {
  private readonly api = inject(Api);
  private readonly confirm = inject(Confirm);
  private readonly toasts = inject(Toasts);
  private readonly shownId = signal<string | null>(null);

  readonly read = readEndpoint(endpoints.readProduction, () => {
    const id = this.shownId();
    return id === null ? undefined : { params: { id } };
  });
  readonly crafts = readEndpoint(endpoints.listCrafts);
  readonly bays = readEndpoint(endpoints.listBays);
  readonly materials = readEndpoint(endpoints.listMaterials);

  readonly production = this.read.value;
  private readonly craftNames = computed(() => namesOf(this.crafts.value()));
  private readonly bayNames = computed(() => namesOf(this.bays.value()));
  private readonly materialNames = computed(() => namesOf(this.materials.value()));
  private readonly stagesById = computed(
    () => new Map((this.production()?.stagesInOrder ?? []).map((stage) => [stage.id, stage])),
  );

  readonly pieces = computed<readonly PieceWithStages[]>(() => {
    const production = this.production();
    return (production?.piecesInOrder ?? []).map((piece) => {
      const stages = (production?.stagesInOrder ?? []).filter((stage) => stage.pieceId === piece.id);
      return {
        piece,
        stages,
        finished: stages.filter((stage) => stage.state === 'finished').length,
        handsOnMinutes: stages.reduce((sum, stage) => sum + stage.handsOn.likelyMinutes, 0),
      };
    });
  });

  constructor() {
    reloadOnChange(this.read, 'production', 'key-date', 'piece', 'stage', 'link', 'purchase');
  }

  /** Which production to show. */
  show(id: string): void {
    this.shownId.set(id);
  }

  craftName(id: string): string {
    return this.craftNames().get(id) ?? 'a craft';
  }

  bayName(id: string): string {
    return this.bayNames().get(id) ?? 'a bay';
  }

  materialName(id: string): string {
    return this.materialNames().get(id) ?? 'a material';
  }

  /** A stage's name with its piece where that is another than `besidePieceId`. */
  stageName(id: string, besidePieceId: string | null = null): string {
    const stage = this.stagesById().get(id);
    if (stage === undefined) {
      return 'a stage of another production';
    }
    const piece = this.production()?.piecesInOrder.find((one) => one.id === stage.pieceId);
    return stage.pieceId === besidePieceId || !piece ? stageTitle(stage) : `${piece.name}: ${stageTitle(stage)}`;
  }

  /** The links by which a stage waits for others. */
  linksInto(stageId: string): readonly StageLink[] {
    return (this.production()?.links ?? []).filter((link) => link.toStageId === stageId);
  }

  /** Removes a piece after asking; whether it is gone. */
  async removePiece(piece: PieceView): Promise<boolean> {
    const sure = await this.confirm.ask({
      title: `Remove ${piece.name}?`,
      text: 'Its stages, links and purchases go with it. This can’t be taken back.',
      action: 'Remove the piece',
    });
    return (
      sure &&
      this.remove(() =>
        this.api.callEndpoint(endpoints.removePiece, { params: { id: piece.id }, query: { version: piece.version } }),
      )
    );
  }

  /** Removes a key date or a purchase after asking. */
  async removeKeyDate(date: { readonly id: string; readonly version: number }, name: string): Promise<void> {
    const sure = await this.confirm.ask({
      title: `Remove the key date “${name}”?`,
      text: 'The plan will no longer be held against it.',
      action: 'Remove it',
    });
    if (sure) {
      await this.remove(() =>
        this.api.callEndpoint(endpoints.removeKeyDate, { params: { id: date.id }, query: { version: date.version } }),
      );
    }
  }

  async removePurchase(purchase: {
    readonly id: string;
    readonly version: number;
    readonly name: string;
  }): Promise<void> {
    const sure = await this.confirm.ask({
      title: `Remove ${purchase.name}?`,
      text: 'The stage that needs it will no longer wait for it.',
      action: 'Remove it',
    });
    if (sure) {
      await this.remove(() =>
        this.api.callEndpoint(endpoints.removePurchase, {
          params: { id: purchase.id },
          query: { version: purchase.version },
        }),
      );
    }
  }

  private async remove(send: () => Promise<unknown>): Promise<boolean> {
    try {
      await send();
      return true;
    } catch (error) {
      this.toasts.fail(error);
      return false;
    } finally {
      this.read.reload();
    }
  }
}

function namesOf(records: readonly { readonly id: string; readonly name: string }[] | undefined): Map<string, string> {
  return new Map((records ?? []).map((record) => [record.id, record.name]));
}
