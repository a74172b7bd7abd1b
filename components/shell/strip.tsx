"use client";

import Link from "next/link";
import { usePathname } from "next/navigation";
import { Keys } from "./keys";
import { PersonMenu, type PersonMenuProps } from "./person-menu";
import { PHONE_PLACES, placeOf, PLACES } from "./places";

export interface StripProps {
  readonly person: PersonMenuProps;
  /** The site in view and where it leads; null where the reader looks at all of them. */
  readonly site: { readonly name: string; readonly href: string } | null;
}

/** The top strip, and on a phone the bottom bar. */
export function Strip({ person, site }: StripProps) {
  const path = usePathname() ?? "";
  const here = placeOf(path, PLACES);
  return (
    <>
      <Keys />
      <a className="skip-link" href="#sheet">
        To the sheet
      </a>
      <header className="strip">
        <Link className="wordmark" href="/floor" aria-label="Keepstep, to the floor">
          Keepstep
        </Link>
        <nav className="strip-places" aria-label="Places">
          {PLACES.map((place, index) => (
            <Link
              key={place.href}
              href={place.href}
              aria-current={place === here ? "page" : undefined}
              aria-keyshortcuts={`Alt+Shift+${index + 1}`}
            >
              {place.label}
            </Link>
          ))}
        </nav>
        <div className="strip-right">
          {site && (
            <Link className="strip-site" href={site.href}>
              {site.name}
            </Link>
          )}
          <form className="strip-search" role="search" action="/search" method="get">
            <input
              className="entry"
              type="search"
              name="q"
              aria-label="Find"
              placeholder="Find a machine, a change, an act"
            />
          </form>
          <PersonMenu {...person} />
        </div>
      </header>
      <PhoneBar path={path} />
    </>
  );
}

function PhoneBar({ path }: { path: string }) {
  const here = placeOf(path, PHONE_PLACES);
  return (
    <nav className="phone-bar" aria-label="On the floor">
      {PHONE_PLACES.map((place) => (
        <Link key={place.href} href={place.href} aria-current={place === here ? "page" : undefined}>
          {place.label}
        </Link>
      ))}
    </nav>
  );
}
