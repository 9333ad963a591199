// The look that components share: cards, fields, buttons.

import { css } from "lit";

export const look = css`
  :host {
    display: block;
  }
  * {
    box-sizing: border-box;
  }
  [hidden] {
    display: none !important;
  }
  section {
    background: var(--card);
    border: 1px solid var(--line);
    border-radius: var(--round);
    padding: var(--gap);
  }
  h2 {
    margin: 0 0 var(--gap);
    font-size: 1.15rem;
  }
  h3 {
    margin: var(--gap) 0 0.4rem;
    font-size: 1rem;
  }
  p {
    margin: 0.4rem 0;
  }
  .soft {
    color: var(--soft);
    font-size: 0.9rem;
  }
  label {
    display: block;
    margin-top: 0.6rem;
    font-weight: 600;
  }
  input,
  select {
    display: block;
    width: 100%;
    min-height: var(--touch);
    margin-top: 0.25rem;
    padding: 0.4rem 0.7rem;
    font: inherit;
    font-weight: 400;
    color: var(--ink);
    background: var(--card);
    border: 1px solid var(--edge);
    border-radius: var(--round);
  }
  select {
    padding-inline: 0.4rem;
  }
  button {
    min-height: var(--touch);
    min-width: var(--touch);
    padding: 0.4rem 1rem;
    font: inherit;
    font-weight: 600;
    color: var(--accent);
    background: var(--card);
    border: 1px solid var(--accent);
    border-radius: var(--round);
    cursor: pointer;
  }
  button.main {
    color: var(--on-accent);
    background: var(--accent);
  }
  .row {
    display: flex;
    flex-wrap: wrap;
    gap: 0.5rem;
    margin-top: 0.6rem;
  }
  :is(input, select, button, summary, a):focus-visible {
    outline: 3px solid var(--accent);
    outline-offset: 2px;
  }
  summary {
    min-height: var(--touch);
    display: flex;
    align-items: center;
    gap: 0.4rem;
    color: var(--accent);
    cursor: pointer;
    list-style: none;
  }
  summary::before {
    content: "+";
    font-weight: 700;
  }
  details[open] > summary::before {
    content: "−";
  }
  .hidden {
    position: absolute;
    width: 1px;
    height: 1px;
    overflow: hidden;
    clip-path: inset(50%);
    white-space: nowrap;
  }
`;
