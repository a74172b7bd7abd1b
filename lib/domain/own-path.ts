/** The page to come back to after signing in: a path of this desk, or the floor. Never another host. */
export function ownPath(wanted: string | null | undefined): string {
  const floor = "/floor";
  if (!wanted || !/^\/(?![/\\])/.test(wanted)) return floor;
  const here = "http://desk.invalid";
  if (!URL.canParse(wanted, here)) return floor;
  const { origin, pathname, search } = new URL(wanted, here);
  const leads = origin === here && !pathname.startsWith("/sign-in") && !pathname.startsWith("/api/");
  return leads ? `${pathname}${search}` : floor;
}
