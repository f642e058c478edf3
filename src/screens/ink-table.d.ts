// ink-table's declarations use the global JSX namespace that @types/react 19 removed
import type React from 'react';

declare global {
  namespace JSX {
    type Element = React.JSX.Element;
  }
}
