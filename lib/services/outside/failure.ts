/** The other side understood and said no: trying again would not help. */
export class PermanentFailure extends Error {
  constructor(message: string) {
    super(message);
    this.name = 'PermanentFailure';
  }
}
