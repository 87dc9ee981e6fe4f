"""The key: tables to evidence, answers to a call, calls to a verdict."""
