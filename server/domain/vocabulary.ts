/** The register's own words, which the interface and the database say alike. */

/** The kinds of fact; each has a table of its own. */
export const FACT_KINDS = [
  'maker',
  'works',
  'model',
  'part-type',
  'position',
  'casting',
  'fitment',
  'supersession',
  'series',
  'serial-range',
  'anchor',
  'cipher',
  'wear-limit',
] as const;
export type FactKind = (typeof FACT_KINDS)[number];

export const MACHINE_KINDS = ['crawler-tractor', 'lathe', 'stationary-engine', 'barn-machine'] as const;
export type MachineKind = (typeof MACHINE_KINDS)[number];

export const SOURCE_KINDS = ['book', 'drawing', 'plate', 'photo', 'sighting', 'correspondence', 'own-knowledge'] as const;
export type SourceKind = (typeof SOURCE_KINDS)[number];

/** `as-built`: left the works so. The two that fit bolt on and work, but were never there on that serial. */
export const FITMENT_VERDICTS = ['as-built', 'later-fits', 'earlier-fits', 'does-not-belong'] as const;
export type FitmentVerdict = (typeof FITMENT_VERDICTS)[number];

/** Whether the old casting also goes where the new one was fitted. */
export const INTERCHANGES = ['both-ways', 'new-for-old'] as const;
export type Interchange = (typeof INTERCHANGES)[number];

/** What a date by a serial number is the date of: four different things, never mixed. */
export const DATE_MEANINGS = ['built', 'dispatched', 'sold', 'model-year'] as const;
export type DateMeaning = (typeof DATE_MEANINGS)[number];

/** How finely the source tells a span's ends. */
export const DATE_PRECISIONS = ['day', 'month', 'year'] as const;
export type DatePrecision = (typeof DATE_PRECISIONS)[number];

/** What a member can be told of, and choose to get by e-mail too. */
export const NOTICE_KINDS = ['account', 'role', 'contribution', 'recomputed', 'reading', 'handover', 'message'] as const;
export type NoticeKind = (typeof NOTICE_KINDS)[number];

export const MEMBER_ROLES = ['member', 'moderator', 'registrar'] as const;
export type MemberRole = (typeof MEMBER_ROLES)[number];

/**
 * Where a contribution stands. `superseded`, the seventh state people see, is an entered one whose version a later one replaced, and is
 * worked out, not kept.
 */
export const CONTRIBUTION_STATES = ['drafted', 'put-forward', 'sent-back', 'entered', 'turned-down', 'withdrawn'] as const;
export type ContributionState = (typeof CONTRIBUTION_STATES)[number];

export const DECISIONS = ['enter', 'send-back', 'turn-down'] as const;
export type Decision = (typeof DECISIONS)[number];

/** What a mark is. */
export const MARK_KINDS = ['casting-number', 'date-code', 'foundry-mark', 'serial', 'plate', 'other'] as const;
export type MarkKind = (typeof MARK_KINDS)[number];

/** Cast when poured, stamped after machining: never merged. */
export const MARK_TECHNIQUES = ['cast', 'stamped'] as const;
export type MarkTechnique = (typeof MARK_TECHNIQUES)[number];

/** Who sees a machine or a part. */
export const VISIBILITIES = ['private', 'by-link', 'public'] as const;
export type Visibility = (typeof VISIBILITIES)[number];

/** Which way a measure wears: `most`: it may grow to the limit; `least`: it may shrink to it. */
export const WEAR_DIRECTIONS = ['most', 'least'] as const;
export type WearDirection = (typeof WEAR_DIRECTIONS)[number];

export const MEASURE_UNITS = ['mm', 'in', 'degree', 'gram', 'newton-metre'] as const;
export type MeasureUnit = (typeof MEASURE_UNITS)[number];

/**
 * How strong the evidence of a mark is, weakest first: typed by somebody · with a photo · another member’s reading, made without seeing the
 * first, agrees · a document, which a moderator accepted.
 */
export const EVIDENCE_STRENGTHS = ['claimed', 'photographed', 'confirmed', 'documented'] as const;
export type EvidenceStrength = (typeof EVIDENCE_STRENGTHS)[number];

/** What a photo may be sent as: told by what is in the file, and its name may not say otherwise. */
export const PHOTO_TYPES = ['jpeg', 'png', 'webp', 'heic'] as const;
export type PhotoType = (typeof PHOTO_TYPES)[number];

export const PHOTO_STATES = ['waiting', 'ready', 'failed'] as const;
export type PhotoState = (typeof PHOTO_STATES)[number];

/** What is made of a photo, in the order in which it is made. */
export const RENDITIONS = ['thumb', 'page', 'full', 'relief'] as const;
export type RenditionName = (typeof RENDITIONS)[number];

export const RENDITION_TYPES = ['image/webp', 'image/avif'] as const;
export type RenditionType = (typeof RENDITION_TYPES)[number];
