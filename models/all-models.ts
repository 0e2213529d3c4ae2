import { UserModel } from './user';
import { PasswordResetModel } from './password-reset';
import { RoomModel } from './room';
import { PlaceModel } from './place';
import { EquipmentModel } from './equipment';
import { SubstanceModel } from './substance';
import { DataSheetModel } from './data-sheet';
import { SolutionModel } from './solution';
import { SolutionSoluteModel } from './solution-solute';
import { DemonstrationModel } from './demonstration';
import { DemonstrationPortionModel } from './demonstration-portion';
import { SessionModel } from './session';
import { RequestModel } from './request';
import { RequestLineModel } from './request-line';
import { PlanModel } from './plan';
import { FindingModel } from './finding';
import { ReviewModel } from './review';
import { ReviewMessageModel } from './review-message';
import { SupplierModel } from './supplier';
import { OfferModel } from './offer';
import { LotModel } from './lot';
import { MovementModel } from './movement';
import { BatchModel } from './batch';
import { BatchRequestModel } from './batch-request';
import { BatchTakeModel } from './batch-take';
import { BatchStepModel } from './batch-step';
import { BottleModel } from './bottle';
import { BudgetModel } from './budget';
import { OrderModel } from './order';
import { OrderLineModel } from './order-line';
import { ShortageModel } from './shortage';
import { ReceiptModel } from './receipt';
import { InvoiceModel } from './invoice';
import { PaymentModel } from './payment';
import { CollectionModel } from './collection';
import { WasteJarModel } from './waste-jar';
import { TaskModel } from './task';
import { RecordEntryModel } from './record-entry';
import { IdempotencyKeyModel } from './idempotency-key';
import { OutboxMessageModel } from './outbox-message';
import { WebhookEventModel } from './webhook-event';
import { CounterModel } from './counter';
import { SettingModel } from './setting';

/** Every table, so that the connection can bind each once. */
export const ALL_MODELS = [
  UserModel,
  PasswordResetModel,
  RoomModel,
  PlaceModel,
  EquipmentModel,
  SubstanceModel,
  DataSheetModel,
  SolutionModel,
  SolutionSoluteModel,
  DemonstrationModel,
  DemonstrationPortionModel,
  SessionModel,
  RequestModel,
  RequestLineModel,
  PlanModel,
  FindingModel,
  ReviewModel,
  ReviewMessageModel,
  SupplierModel,
  OfferModel,
  LotModel,
  MovementModel,
  BatchModel,
  BatchRequestModel,
  BatchTakeModel,
  BatchStepModel,
  BottleModel,
  BudgetModel,
  OrderModel,
  OrderLineModel,
  ShortageModel,
  ReceiptModel,
  InvoiceModel,
  PaymentModel,
  CollectionModel,
  WasteJarModel,
  TaskModel,
  RecordEntryModel,
  IdempotencyKeyModel,
  OutboxMessageModel,
  WebhookEventModel,
  CounterModel,
  SettingModel,
] as const;
