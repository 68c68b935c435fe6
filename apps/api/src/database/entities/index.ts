import { AccountToken } from './account-token.entity.ts';
import { AuditEvent } from './audit-event.entity.ts';
import { Characteristic } from './characteristic.entity.ts';
import { CharacteristicDecision } from './characteristic-decision.entity.ts';
import { CharacteristicResult } from './characteristic-result.entity.ts';
import { StoredCheck } from './check.entity.ts';
import { Delivery } from './delivery.entity.ts';
import { Deviation } from './deviation.entity.ts';
import { Disposition } from './disposition.entity.ts';
import { ElementDecision } from './element-decision.entity.ts';
import { ElementFile } from './element-file.entity.ts';
import { Gauge } from './gauge.entity.ts';
import { IdempotencyKey } from './idempotency-key.entity.ts';
import { InterimCondition } from './interim-condition.entity.ts';
import { Organisation } from './organisation.entity.ts';
import { OrganisationLink } from './organisation-link.entity.ts';
import { OutboxMail } from './outbox-mail.entity.ts';
import { Part } from './part.entity.ts';
import { PartRevision } from './part-revision.entity.ts';
import { Reminder } from './reminder.entity.ts';
import { ApprovalRequest } from './request.entity.ts';
import { RequestMessage } from './request-message.entity.ts';
import { RequestReviewer } from './request-reviewer.entity.ts';
import { SamplePiece } from './sample-piece.entity.ts';
import { SealedPackage } from './sealed-package.entity.ts';
import { Session } from './session.entity.ts';
import { Signature } from './signature.entity.ts';
import { Site } from './site.entity.ts';
import { StoredFile } from './stored-file.entity.ts';
import { Submission } from './submission.entity.ts';
import { SubmissionElement } from './submission-element.entity.ts';
import { SubmissionStream } from './submission-stream.entity.ts';
import { SupplyLine } from './supply-line.entity.ts';
import { TableImport } from './table-import.entity.ts';
import { UsedBalloon } from './used-balloon.entity.ts';
import { User } from './user.entity.ts';

/** Every table, listed by hand: bundles have no folder to scan. */
export const entities = [
  AccountToken,
  AuditEvent,
  Characteristic,
  CharacteristicDecision,
  CharacteristicResult,
  StoredCheck,
  Delivery,
  Deviation,
  Disposition,
  ElementDecision,
  ElementFile,
  Gauge,
  IdempotencyKey,
  InterimCondition,
  Organisation,
  OrganisationLink,
  OutboxMail,
  Part,
  PartRevision,
  Reminder,
  ApprovalRequest,
  RequestMessage,
  RequestReviewer,
  SamplePiece,
  SealedPackage,
  Session,
  Signature,
  Site,
  StoredFile,
  Submission,
  SubmissionElement,
  SubmissionStream,
  SupplyLine,
  TableImport,
  UsedBalloon,
  User,
];
