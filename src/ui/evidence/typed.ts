/** What is typed into the form of a test so far, by field; kept as a draft until it is added or dropped. */
export type Typed = Readonly<Record<string, string>>;

/** What every form of a test is given besides its own. */
export type Typing = { readonly typed: Typed; readonly ontype: (part: Typed) => void };
