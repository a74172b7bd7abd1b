/** OWASP ASVS 6.2: length counts, composition rules do not; nothing is trimmed or shortened. */
export const PASSWORD_MIN = 12;
export const PASSWORD_MAX = 200;
const FEWEST_DIFFERENT = 5;
/** What must remain of a password once the words that anybody would guess are taken out. */
const FEWEST_OWN = 8;
const CONTEXT_WORDS = ["keepstep", "password"];

export interface PasswordOwner {
  readonly email: string;
  readonly name: string;
}

/** What is wrong with a password for this person, in a sentence; null when it will do. */
export function passwordProblem(password: string, owner: PasswordOwner): string | null {
  const length = [...password].length;
  if (length < PASSWORD_MIN)
    return `A password has at least ${PASSWORD_MIN} characters. Four or five words in a row make a good one.`;
  if (length > PASSWORD_MAX) return `A password has at most ${PASSWORD_MAX} characters.`;
  if (new Set(password.toLowerCase()).size < FEWEST_DIFFERENT)
    return `A password has at least ${FEWEST_DIFFERENT} different characters.`;
  if (remainder(password, owner).length < FEWEST_OWN)
    return "A password is more than a name, an e-mail address or the name of this desk. Add words that nobody would guess.";
  return null;
}

function remainder(password: string, { email, name }: PasswordOwner): string {
  const parts = `${email} ${name}`.toLowerCase().split(/[^\p{L}\p{N}]+/u);
  const words = [email.toLowerCase(), name.toLowerCase(), ...parts, ...CONTEXT_WORDS];
  const guessable = words.filter((word) => word.length >= 3).sort((a, b) => b.length - a.length);
  return guessable.reduce((left, word) => left.replaceAll(word, ""), password.toLowerCase());
}
