import { ButtonLink } from "@/components/ui/button";
import { Sheet, SheetHead } from "@/components/ui/sheet";

export const metadata = { title: "Not found" };

export default function NotFound() {
  return (
    <Sheet width="narrow">
      <SheetHead
        title="There is no such sheet"
        subtitle="The address is wrong, or what it led to is not for your role. Nothing was changed."
      />
      <form className="not-found-search" role="search" action="/search" method="get">
        <input
          className="entry"
          type="search"
          name="q"
          aria-label="Find"
          placeholder="Find a machine, a change, an act"
        />
        <button type="submit" className="button button-plain">
          Find
        </button>
      </form>
      <div className="acts">
        <ButtonLink variant="primary" href="/floor">
          To the floor
        </ButtonLink>
      </div>
    </Sheet>
  );
}
