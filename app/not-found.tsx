import { LinkButton } from '@/components/ui/button';

export default function NotFound() {
  return (
    <div className="mx-auto max-w-xl px-4 py-16">
      <h1 className="text-2xl">There is nothing at this address</h1>
      <p className="my-3">It may have been moved, or the code was mistyped.</p>
      <LinkButton href="/">Go to Today</LinkButton>
    </div>
  );
}
