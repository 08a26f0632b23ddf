import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormControl, NonNullableFormBuilder, Validators } from '@angular/forms';
import { MAT_DIALOG_DATA, MatDialogRef } from '@angular/material/dialog';
import { endpoints, Name, type PurchaseView } from '@common/contract';
import { Api } from '../../api';
import { ChoiceField, type Choice } from '../../ui/choice-field';
import { VersionedWrites } from '../../ui/conflict-dialog';
import { keeps } from '../../ui/field-errors';
import { FigureField } from '../../ui/figure-field';
import { FormDialog } from '../../ui/form-dialog';
import { FormSave } from '../../ui/form-save';
import { STUDIO_CURRENCY } from '../../ui/money';
import { moneyIn } from '../../ui/reads-text';
import { TextField } from '../../ui/text-field';

/** What the dialog is opened with. */
export interface PurchaseDialogData {
  readonly productionId: string;
  /** The purchase to change; null to add one. */
  readonly purchase: PurchaseView | null;
  readonly stages: readonly Choice<string>[];
}

const LABELS = {
  stageId: 'Needed for',
  name: 'What',
  supplier: 'Supplier',
  leadDays: 'Days to come',
  orderedOn: 'Ordered',
  dueOn: 'Due',
  receivedOn: 'Received',
  costMinor: 'Cost',
};

/** Adds a purchase or changes one; closes with true where something was saved. */
@Component({
  selector: 'fettle-purchase-dialog',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [ChoiceField, FigureField, FormDialog, TextField],
  template: `
    <fettle-form-dialog
      [title]="data.purchase ? 'Change the purchase' : 'Add a purchase'"
      [save]="save"
      (submitted)="submit()"
    >
      <fettle-text-field label="What is bought" [control]="form.controls.name" />
      <fettle-choice-field label="The stage that needs it" [control]="form.controls.stageId" [choices]="data.stages" />
      <div class="fields">
        <fettle-text-field label="Supplier" [control]="form.controls.supplier" [longest]="120" />
        <fettle-figure-field label="Time to come" unit="days" [control]="form.controls.leadDays" />
        <fettle-figure-field label="Cost" [reader]="money" [unit]="currency" [control]="form.controls.costMinor" />
      </div>
      <div class="fields">
        <fettle-text-field label="Ordered on" type="date" [control]="form.controls.orderedOn" />
        <fettle-text-field label="Due on" type="date" [control]="form.controls.dueOn" />
        <fettle-text-field label="Received on" type="date" [control]="form.controls.receivedOn" />
      </div>
    </fettle-form-dialog>
  `,
})
export class PurchaseDialog {
  private readonly api = inject(Api);
  private readonly writes = inject(VersionedWrites);
  private readonly ref = inject<MatDialogRef<PurchaseDialog, boolean>>(MatDialogRef);

  protected readonly data = inject<PurchaseDialogData>(MAT_DIALOG_DATA);
  protected readonly currency = inject(STUDIO_CURRENCY)();
  protected readonly money = moneyIn(this.currency);
  protected readonly save = new FormSave();
  private readonly from = this.data.purchase;

  protected readonly form = inject(NonNullableFormBuilder).group({
    name: [this.from?.name ?? '', [Validators.required, keeps(Name)]],
    stageId: [this.from?.stageId ?? '', Validators.required],
    supplier: [this.from?.supplier ?? ''],
    leadDays: new FormControl<number | null>(this.from?.leadDays ?? 14, [
      Validators.required,
      Validators.min(0),
      Validators.max(730),
    ]),
    orderedOn: [this.from?.orderedOn ?? ''],
    dueOn: [this.from?.dueOn ?? ''],
    receivedOn: [this.from?.receivedOn ?? ''],
    costMinor: new FormControl<number | null>(this.from?.costMinor ?? 0, [Validators.required, Validators.min(0)]),
  });

  protected async submit(): Promise<void> {
    if ((await this.save.run(this.form, () => this.send())) !== undefined) {
      this.ref.close(true);
    }
  }

  private async send(): Promise<PurchaseView | null> {
    const raw = this.form.getRawValue();
    const body = {
      ...raw,
      leadDays: raw.leadDays ?? 0,
      costMinor: raw.costMinor ?? 0,
      orderedOn: raw.orderedOn || null,
      dueOn: raw.dueOn || null,
      receivedOn: raw.receivedOn || null,
    };
    const { purchase, productionId } = this.data;
    if (purchase === null) {
      return this.api.callEndpoint(endpoints.createPurchase, { params: { id: productionId }, body });
    }
    return this.writes.save({
      version: purchase.version,
      labels: LABELS,
      send: (version) =>
        this.api.callEndpoint(endpoints.changePurchase, { params: { id: purchase.id }, body: { ...body, version } }),
    });
  }
}
