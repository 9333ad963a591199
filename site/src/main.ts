// Where the page starts.

import "./app";
