export interface DemoPerson {
  readonly role: "viewer" | "technician" | "engineer" | "approver" | "admin";
  readonly name: string;
  readonly email: string;
  readonly password: string;
}

/** The people of the demo fleet, at least one a role; all invented. */
export function demoPeople(): readonly DemoPerson[];
