import { AttemptCount } from "./attempt-count.entity.ts";
import { CampaignVersion } from "./campaign.entity.ts";
import { CatalogueEdition } from "./catalogue-edition.entity.ts";
import { EntryEntity } from "./entry.entity.ts";
import { Extract } from "./extract.entity.ts";
import { InstrumentCardVersion } from "./instrument-card.entity.ts";
import { JobRow } from "./job.entity.ts";
import { ListMember } from "./list-member.entity.ts";
import { LogbookChain } from "./logbook-chain.entity.ts";
import { LogbookLine } from "./logbook-line.entity.ts";
import { Mail } from "./mail.entity.ts";
import { Member } from "./member.entity.ts";
import { MeritVersion } from "./merit.entity.ts";
import { OneTimeLink } from "./one-time-link.entity.ts";
import { Person } from "./person.entity.ts";
import { Programme } from "./programme.entity.ts";
import { ReadingPlanVersion } from "./reading-plan.entity.ts";
import { RecipeVersion } from "./recipe.entity.ts";
import { RefusedRow } from "./refused-row.entity.ts";
import { SelectionVersion } from "./selection.entity.ts";
import { StarEntity } from "./star.entity.ts";
import { StoredSession } from "./stored-session.entity.ts";
import { TargetList } from "./target-list.entity.ts";

export const ENTITIES = [
  AttemptCount,
  CampaignVersion,
  CatalogueEdition,
  EntryEntity,
  Extract,
  InstrumentCardVersion,
  JobRow,
  ListMember,
  LogbookChain,
  LogbookLine,
  Mail,
  Member,
  MeritVersion,
  OneTimeLink,
  Person,
  Programme,
  ReadingPlanVersion,
  RecipeVersion,
  RefusedRow,
  SelectionVersion,
  StarEntity,
  StoredSession,
  TargetList,
];
