import Link from "next/link";

export interface MailTextProps {
  readonly text: string;
  /** Where this desk is reached; only its own links can be followed. */
  readonly deskUrl: string;
}

/** A mail's plain text as it was sent, with the links to this desk made ready to follow. */
export function MailText({ text, deskUrl }: MailTextProps) {
  const parts = text.split(/(https?:\/\/[^\s<>"]+)/);
  return (
    <pre className="code whitespace-pre-wrap break-words">
      {parts.map((part, index) =>
        part.startsWith(`${deskUrl}/`) ? (
          <Link key={index} href={part.slice(deskUrl.length)}>
            {part}
          </Link>
        ) : (
          part
        ),
      )}
    </pre>
  );
}
