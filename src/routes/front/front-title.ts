import { useEffect } from 'react';

/** The front page carries the product's own title, as index.html does before any script runs. */
export function useFrontTitle(): void {
  useEffect(() => {
    document.title = 'Flightcase: multitracks, packed right before they travel';
  }, []);
}
