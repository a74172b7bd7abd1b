import "server-only";
import { User } from "@/models/people";
import type { Context } from "@/lib/services/kernel/context";
import { ServiceError } from "@/lib/services/kernel/errors";
import { checkCredentials } from "./open";

/** A signature takes the password again; wrong tries count like wrong sign-ins. */
export async function demandPassword(
  context: Context,
  input: { userId: string; password: string },
): Promise<void> {
  const user = await User.findByPk(input.userId);
  const checked =
    user && (await checkCredentials({ email: user.email, password: input.password, now: context.now }));
  if (!checked)
    throw new ServiceError("invalid", "The password is not right. Nothing was signed.", {
      pointer: "/password",
    });
}
