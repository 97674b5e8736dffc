import { CodeKey } from './blind/code-key.entity.ts';
import { DrawSecret } from './blind/draw-secret.entity.ts';
import { PasswordReset } from './features/account/password-reset.entity.ts';
import { Attendance } from './features/attendances/attendance.entity.ts';
import { Listener } from './features/attendances/listener.entity.ts';
import { Audit } from './features/audits/audit.entity.ts';
import { Cable } from './features/cables/cable.entity.ts';
import { Specimen } from './features/cables/specimen.entity.ts';
import { Evidence } from './features/evidence/evidence.entity.ts';
import { Invitation } from './features/invitations/invitation.entity.ts';
import { LevelDuty } from './features/levels/level-duty.entity.ts';
import { Measurement } from './features/measurements/measurement.entity.ts';
import { Membership } from './features/organisations/membership.entity.ts';
import { Organisation } from './features/organisations/organisation.entity.ts';
import { PastRole } from './features/organisations/past-role.entity.ts';
import { Publication } from './features/publications/publication.entity.ts';
import { RigPreset } from './features/rig-presets/rig-preset.entity.ts';
import { Answer } from './features/sessions/answer.entity.ts';
import { Remark } from './features/sessions/remark.entity.ts';
import { PresentationRequest } from './features/sessions/request.entity.ts';
import { Seat } from './features/sessions/seat.entity.ts';
import { Session } from './features/sessions/session.entity.ts';
import { SignInAttempt } from './features/sign-in/sign-in-attempt.entity.ts';
import { WebSession } from './features/sign-in/web-session.entity.ts';
import { ProtocolVersion } from './features/studies/protocol-version.entity.ts';
import { Study } from './features/studies/study.entity.ts';
import { User } from './features/users/user.entity.ts';
import { RecordEntry } from './ledger/entry.entity.ts';
import { HeadSignatureRow } from './ledger/head-signature.entity.ts';
import { RegistryHeadRow } from './ledger/registry-head.entity.ts';
import { RegistryLeafRow } from './ledger/registry-leaf.entity.ts';
import { SigningKey } from './ledger/signing-key.entity.ts';
import { OutgoingMail } from './mail/outgoing-mail.entity.ts';
import { TimestampToken } from './timestamps/timestamp-token.entity.ts';
import { TokenRequest } from './timestamps/token-request.entity.ts';

/** Every table. */
export const entities = [
  Organisation,
  User,
  Membership,
  WebSession,
  Cable,
  Specimen,
  Measurement,
  Evidence,
  Study,
  ProtocolVersion,
  RecordEntry,
  SigningKey,
  HeadSignatureRow,
  RegistryLeafRow,
  RegistryHeadRow,
  TokenRequest,
  TimestampToken,
  Audit,
  Session,
  Seat,
  Answer,
  Remark,
  PresentationRequest,
  CodeKey,
  DrawSecret,
  Publication,
  OutgoingMail,
  Invitation,
  PasswordReset,
  SignInAttempt,
  PastRole,
  Listener,
  Attendance,
  LevelDuty,
  RigPreset,
];
