export interface MailCatcher {
  readonly port: number;
  /** For SMTP_URL. */
  readonly url: string;
  stop(): Promise<void>;
}

/** A mail server on 127.0.0.1 that delivers nothing: every mail becomes a file in `folder`. */
export function startMailCatcher(options: {
  readonly folder: string;
  readonly port?: number;
  readonly now?: () => Date;
}): Promise<MailCatcher>;

/** Removes all but the newest mails. */
export function trimMails(folder: string, kept?: number): void;
