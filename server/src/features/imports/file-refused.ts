/** Why a file as a whole cannot be taken, in words for the person who sent it. */
export class FileRefused extends Error {}
