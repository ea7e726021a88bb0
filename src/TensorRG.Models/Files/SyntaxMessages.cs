namespace TensorRG.Models.Files;

/// <summary>Says in our words, with a remedy, what the TOML parser complains about.</summary>
internal static class SyntaxMessages
{
    // The first fragment that the parser's message contains decides.
    private static readonly (string Fragment, string Message)[] Table =
    [
        ("newline in a string", "A text is not closed on its line. Close it with a quote, or put it between three quotes to span lines."),
        ("string literal", "A text is not closed. Close it with the quote that opened it."),
        ("End-Of-File found", "A text is not closed. Close it with the quote that opened it."),
        ("escape", "A backslash in a text starts an unknown escape. Write \\\\ for a backslash, or put the text between single quotes."),
        ("Unable to parse integer", "This whole number is too large. Write it as a decimal, such as 1e20."),
        ("leading zero", "A number starts with a needless zero. Remove the zero."),
        ("control character", "A control character stands in the file. Remove it."),
        ("inline table", "A table in braces is not complete. Write { key = value, key = value } and close the brace."),
        ("for an array", "A list is not closed. Separate its items by commas and close it with ']'."),
        ("Expecting `=`", "A key is not followed by '='. Write key = value."),
        ("expecting a value", "There is no value after '='. Write one: a number, a text in quotes, a list or a table in braces."),
        ("for a value", "This is no value. Put texts and expressions in quotes; numbers, true and false stand without."),
        ("token `newline`", "Something follows a complete line. Put one key = value on each line, and texts with spaces in quotes."),
        ("`]`", "The header of a table is not right. Write [name] or [[name]] on a line of its own."),
        ("base key", "A name is missing. Write [name] for a header, key = value for a key."),
        ("number", "This number is not well formed. Write it like 1, -2.5 or 1e-3."),
        ("digit", "This number is not well formed. Write it like 1, -2.5 or 1e-3."),
        ("float", "This number is not well formed. Write it like 1, -2.5 or 1e-3."),
        ("integer", "This number is not well formed. Write it like 1, -2.5 or 1e-3."),
        ("token", "Something stands here that does not belong. A line reads key = value, [name] or # comment."),
    ];

    /// <summary>The message in our words.</summary>
    /// <param name="message">The parser's.</param>
    public static string Translate(string message)
    {
        foreach ((string fragment, string ours) in Table)
        {
            if (message.Contains(fragment, StringComparison.OrdinalIgnoreCase))
                return ours;
        }
        return "The file is no valid TOML here. A line reads key = value, [name] or # comment: correct it.";
    }
}
