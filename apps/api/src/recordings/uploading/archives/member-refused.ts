/** A file of an archive does not come in; the message says why, for the person who sent it. */
export class MemberRefused extends Error {}
