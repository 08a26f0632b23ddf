/** What a job is given to work with besides its task; `Progress` is what it tells on the way. */
export interface JobHooks<Progress> {
  /** Whether whoever asked no longer wants it, or only what was found so far. */
  readonly isCancelled: () => boolean;
  /** Tells how far it has come; often is fine, only some of it is passed on. */
  readonly tell: (progress: Progress) => void;
}

/** How much of what a search has to weigh it has weighed. */
export interface SearchProgress {
  readonly weighed: number;
  readonly of: number;
}
