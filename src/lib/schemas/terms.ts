/**
 * The closed lists of words that requests and screens share. Apart from the schemas, because the browser needs the words and not zod,
 * which is large and tries at once whether it may evaluate code: the content security policy forbids that.
 */

/** Methods of the evidence files, in the order screens offer them. */
export const METHODS = [
	'micro-ct',
	'clearing',
	'sectioning',
	'cbct',
	'microscope',
	'clinical',
	'mixed',
	'radiograph',
	'review'
] as const;

/** Kinds of things a search finds. */
export const SEARCH_KINDS = ['tooth', 'root', 'feature', 'source', 'country'] as const;

/** Methods an estimate can be narrowed to: everything but published reviews, which are never pooled. */
export const POOLED_METHODS = METHODS.filter((method) => method !== 'review');

/** What an entry's figures count. */
export const MEASURES = [
	'configuration',
	'canal-count',
	'root-count',
	'foramen-count',
	'feature',
	'confluence',
	'extra-canal-confluence'
] as const;

/** How an entry's figures came here: seen in the source, seen quoted in another one, or recalled and not seen. */
export const PROVENANCES = ['read', 'secondary', 'memory'] as const;

/** Roots of the evidence files; `whole` counts teeth, `fused` roots grown together. */
export const ENTRY_ROOTS = [
	'whole',
	'single',
	'B',
	'P',
	'L',
	'MB',
	'DB',
	'M',
	'D',
	'DL',
	'ML',
	'fused'
] as const;

/** What entries can be sorted by. A leading - reverses an order. */
export const ENTRY_SORTS = [
	'id',
	'source',
	'author',
	'year',
	'tooth',
	'root',
	'measure',
	'method',
	'country',
	'total'
] as const;
/** What sources can be sorted by. */
export const SOURCE_SORTS = ['id', 'author', 'title', 'year', 'entries'] as const;

/** Filters of the table's entries, by their names in an address. */
export const ENTRY_FILTERS = ['tooth', 'root', 'measure', 'method', 'country', 'source', 'q'] as const;

/** Names of the filters in an address. The lists among them may repeat. */
export const FILTER_FIELDS = [
	'method',
	'country',
	'yearFrom',
	'yearTo',
	'minTotal',
	'exclude',
	'appraisal'
] as const;

/** The tests that can tell whether two canals join, in the order answers list them. */
export const TESTS = [
	'cone-mark',
	'draw',
	'file-contact',
	'two-files',
	'angled-radiograph',
	'cbct-reading'
] as const;
export const RESULTS = ['positive', 'negative', 'unclear'] as const;
/** How a root was searched for further canals. */
export const SEARCHES = ['unaided', 'loupes', 'microscope', 'microscope-troughing', 'cbct'] as const;

/** What can be measured of the level of a confluence, in the order screens list them. */
export const MEASUREMENT_KINDS = ['cone-mark', 'cone-shortfall', 'file-contact', 'cbct'] as const;
/** How far the second canal was shaped. */
export const SHAPED_TO = ['full', 'confluence', 'unknown'] as const;

/** What a person may be; they may be several. A visitor is none. */
export const ROLES = ['student', 'dentist', 'educator', 'administrator'] as const;
export type Role = (typeof ROLES)[number];

/** What a token of the API may be used for; never for more than its owner may. */
export const SCOPES = ['account:read', 'table:read', 'table:write', 'people:read', 'audit:read'] as const;
export type Scope = (typeof SCOPES)[number];

/** Days a token of the API may live. */
export const TOKEN_DAYS = [7, 30, 90, 365] as const;

/** Code points of a password, at least: NIST SP 800-63B-4, 3.1.1.2, for a password that is the only factor. */
export const PASSWORD_LEAST = 15;
/** And at most: NIST asks for 64 or more; an end, because every character is worked on. */
export const PASSWORD_MOST = 256;

/** Everything the audit log records. */
export const AUDIT_ACTIONS = [
	'installation set up',
	'signed in',
	'sign-in refused',
	'signed out',
	'device signed out',
	'all devices signed out',
	'invited',
	'invitation sent again',
	'invitation revoked',
	'invitation accepted',
	'name changed',
	'password changed',
	'reset asked',
	'reset link made',
	'password reset',
	'e-mail change asked',
	'e-mail changed',
	'second factor on',
	'second factor off',
	'recovery code used',
	'recovery codes renewed',
	'token made',
	'token revoked',
	'roles changed',
	'deactivated',
	'reactivated',
	'settings changed',
	'audit exported',
	'mail retried',
	'mail dropped',
	'source added',
	'source changed',
	'source removed',
	'source retracted',
	'retraction lifted',
	'source appraised',
	'file attached',
	'file removed',
	'table imported',
	'import undone'
] as const;
export type AuditAction = (typeof AUDIT_ACTIONS)[number];

/** @internal for its test */
export const MAIL_KINDS = [
	'invitation',
	'reset',
	'e-mail change',
	'e-mail change notice',
	'review asked',
	'entry returned',
	'entry published'
] as const;
export type MailKind = (typeof MAIL_KINDS)[number];

export const MAIL_STATES = ['waiting', 'sending', 'sent', 'failed', 'dropped'] as const;
export type MailState = (typeof MAIL_STATES)[number];

/** Concern that an appraisal of a source leaves, the least first. */
export type AppraisalGrade = 'low' | 'some' | 'high';
/** Which appraisals a filter lets pass: any at all, or those that leave at most this concern. */
export const APPRAISAL_FILTERS = ['any', 'some', 'low'] as const;
export const APPRAISAL_ANSWERS = ['yes', 'partly', 'no', 'unclear'] as const;
export type AppraisalAnswer = (typeof APPRAISAL_ANSWERS)[number];

/** Kinds of source the form offers: types of CSL 1.0.2. The list is short; a source of another type keeps it. */
export const SOURCE_TYPES = [
	'article-journal',
	'chapter',
	'book',
	'thesis',
	'paper-conference',
	'report',
	'standard',
	'webpage',
	'article'
] as const;
/** Texts a citation can be pasted as. */
export const PASTED_FORMATS = ['bibtex', 'ris', 'csl'] as const;

/**
 * Probability of one shared exit from which canals are treated as joined, unless somebody asks for another. High, because shortening
 * a separate canal leaves it unfilled, the worse mistake (inference, section 4).
 */
export const USUAL_THRESHOLD = 0.9;
/** What screens offer; the API takes up to 0.999. */
export const THRESHOLD_RANGE = [0.5, 0.99] as const;

/** The nine yes/no questions of a root, as addresses name them. */
export const QUESTION_NAMES = ['q1', 'q2', 'q3', 'q4', 'q5', 'q6', 'q7', 'q8', 'q9'] as const;
/** Orders of the samples of a question, as screens offer them. */
export const STUDY_SORTS = ['share', 'year', 'size', 'weight', 'source', 'country'] as const;
export type StudySort = (typeof STUDY_SORTS)[number];
