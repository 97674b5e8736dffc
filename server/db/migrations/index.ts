import { FirstSchema1796083200000 } from './1796083200000-first-schema.ts';
import { Publications1796126400000 } from './1796126400000-publications.ts';
import { Mail1796130000000 } from './1796130000000-mail.ts';
import { People1796130100000 } from './1796130100000-people.ts';
import { Attendances1796130400000 } from './1796130400000-attendances.ts';
import { Signatures1796140800000 } from './1796140800000-signatures.ts';
import { Timestamps1796140900000 } from './1796140900000-timestamps.ts';
import { ImmutableRecord1796141000000 } from './1796141000000-immutable-record.ts';
import { Audits1796141100000 } from './1796141100000-audits.ts';
import { FrozenPublications1796141200000 } from './1796141200000-frozen-publications.ts';
import { Registry1796142000000 } from './1796142000000-registry.ts';
import { ProtocolVersions1796142100000 } from './1796142100000-protocol-versions.ts';
import { Construction1796149000000 } from './1796149000000-construction.ts';
import { RigPresets1796151000000 } from './1796151000000-rig-presets.ts';
import { Measurements1796151400000 } from './1796151400000-measurements.ts';
import { LevelDuties1796152000000 } from './1796152000000-level-duties.ts';
import { PresentationRequests1796152400000 } from './1796152400000-presentation-requests.ts';
import { Remarks1796153000000 } from './1796153000000-remarks.ts';
import { Evidence1796153400000 } from './1796153400000-evidence.ts';

/** Every migration, oldest first. */
export const migrations = [
  FirstSchema1796083200000,
  Publications1796126400000,
  Mail1796130000000,
  People1796130100000,
  Attendances1796130400000,
  Signatures1796140800000,
  Timestamps1796140900000,
  ImmutableRecord1796141000000,
  Audits1796141100000,
  FrozenPublications1796141200000,
  Registry1796142000000,
  ProtocolVersions1796142100000,
  Construction1796149000000,
  RigPresets1796151000000,
  Measurements1796151400000,
  LevelDuties1796152000000,
  Remarks1796153000000,
  Evidence1796153400000,
  PresentationRequests1796152400000,
];
