import { AccessTokenEntity } from './entities/access-token.ts';
import { InviteEntity } from './entities/invite.ts';
import { MembershipEntity } from './entities/membership.ts';
import { OneTimeLinkEntity } from './entities/one-time-link.ts';
import { OutboxMessageEntity } from './entities/outbox-message.ts';
import { PersonEntity } from './entities/person.ts';
import { SessionEntity } from './entities/session.ts';
import { TeamEntity } from './entities/team.ts';
import { DroughtRecordEntity } from './entities/drought-record.ts';
import { FeatureImportEntity } from './entities/feature-import.ts';
import { FeatureEntity } from './entities/feature.ts';
import { FitEntity, FitLayerEntity } from './entities/fit.ts';
import { GridChangeEntity } from './entities/grid-change.ts';
import { LayerEntity } from './entities/layer.ts';
import { OptionEntity } from './entities/option.ts';
import { OptionDrawingEntity, OptionRevisionEntity } from './entities/option-revision.ts';
import { RunEntity } from './entities/run.ts';
import { RunFrameEntity } from './entities/run-frame.ts';
import { RunLayerEntity } from './entities/run-layer.ts';
import { ComparisonEntity } from './entities/comparison.ts';
import {
  ComparisonEventEntity,
  ComparisonLayerEntity,
  EnsembleMapEntity,
  ReplicateEntity,
  StudyRunEntity,
} from './entities/comparison-parts.ts';
import { LibraryPlantEntity, PlantVersionEntity } from './entities/library-plant.ts';
import { BriefEntity, BriefMapEntity, BriefMessageEntity, BriefVersionEntity } from './entities/brief.ts';
import { SiteEntity } from './entities/site.ts';
import { SiteCostsEntity } from './entities/site-costs.ts';
import { UploadEntity } from './entities/upload.ts';

/** Every table. */
export const entities = [
  PersonEntity,
  TeamEntity,
  MembershipEntity,
  SessionEntity,
  AccessTokenEntity,
  InviteEntity,
  OneTimeLinkEntity,
  OutboxMessageEntity,
  LibraryPlantEntity,
  PlantVersionEntity,
  SiteEntity,
  SiteCostsEntity,
  DroughtRecordEntity,
  LayerEntity,
  UploadEntity,
  GridChangeEntity,
  FeatureImportEntity,
  FeatureEntity,
  OptionEntity,
  OptionRevisionEntity,
  OptionDrawingEntity,
  RunEntity,
  RunFrameEntity,
  RunLayerEntity,
  ComparisonEntity,
  ReplicateEntity,
  EnsembleMapEntity,
  ComparisonLayerEntity,
  ComparisonEventEntity,
  FitEntity,
  FitLayerEntity,
  StudyRunEntity,
  BriefEntity,
  BriefVersionEntity,
  BriefMapEntity,
  BriefMessageEntity,
];
