"""Entry to one frozen report: everything known about a compound."""
