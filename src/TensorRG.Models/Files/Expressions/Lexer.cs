using System.Globalization;
using System.Numerics;

namespace TensorRG.Models.Files.Expressions;

/// <summary>Cuts an expression into tokens.</summary>
internal static class Lexer
{
    private static readonly string[] Symbols = ["==", "!=", "<=", ">=", "<", ">", "+", "-", "*", "/", "^", "(", ")", ","];

    /// <summary>All tokens, the end included.</summary>
    /// <param name="text">The expression.</param>
    /// <param name="spot">Where it stands.</param>
    /// <exception cref="ModelFileException">A character or number that does not belong there.</exception>
    public static List<Token> Read(string text, TextSpot spot)
    {
        List<Token> tokens = [];
        int position = 0;
        while (position < text.Length)
        {
            if (char.IsWhiteSpace(text[position]))
            {
                position++;
                continue;
            }
            Token token = Next(text, position, spot);
            tokens.Add(token);
            position += token.Text.Length;
        }
        tokens.Add(new(TokenKind.End, "", text.Length));
        return tokens;
    }

    private static Token Next(string text, int position, TextSpot spot)
    {
        char c = text[position];
        if (char.IsAsciiDigit(c) || (c == '.' && position + 1 < text.Length && char.IsAsciiDigit(text[position + 1])))
            return Number(text, position, spot);
        if (char.IsAsciiLetter(c) || c == '_')
            return new(TokenKind.Name, text[position..NameEnd(text, position)], position);
        string? symbol = Array.Find(Symbols, s => string.CompareOrdinal(text, position, s, 0, s.Length) == 0);
        return symbol is not null ? new(TokenKind.Symbol, symbol, position) : throw spot.Error(position, Stray(c));
    }

    private static int NameEnd(string text, int position)
    {
        while (position < text.Length && (char.IsAsciiLetterOrDigit(text[position]) || text[position] == '_'))
            position++;
        return position;
    }

    private static string Stray(char c) => c switch
    {
        '=' => "A single '=' stands in an expression. Compare with '=='.",
        '!' => "'!' stands in an expression. Write 'not', or '!=' for unequal.",
        '&' or '|' => $"'{c}' stands in an expression. Write 'and' or 'or'.",
        '[' or ']' or '{' or '}' => $"'{c}' stands in an expression. Use round parentheses.",
        '%' => "'%' stands in an expression. Write mod(a, b).",
        _ => $"The character {SourceText.Quote(c.ToString())} has no meaning in an expression. Use names of ASCII letters, numbers, and + - * / ^ ( ) , == != < <= > >=.",
    };

    private static Token Number(string text, int start, TextSpot spot)
    {
        int end = Digits(text, start);
        if (end < text.Length && text[end] == '.' && !(end + 1 < text.Length && text[end + 1] == '.'))
            end = Digits(text, end + 1);
        end = Exponent(text, end);
        string digits = text[start..end];
        double value = double.Parse(digits, NumberStyles.Float, CultureInfo.InvariantCulture);
        if (!double.IsFinite(value))
            throw spot.Error(start, $"The number {SourceText.Quote(digits)} is too large. Numbers go up to 1.7e308.");
        bool imaginary = end < text.Length && text[end] == 'i' && NameEnd(text, end) == end + 1;
        if (!imaginary && NameEnd(text, end) > end)
            throw spot.Error(end, $"The number {digits} runs into {SourceText.Quote(text[end..NameEnd(text, end)])}. Put '*' between them for a product.");
        return imaginary
            ? new(TokenKind.Number, text[start..(end + 1)], start, new Complex(0, value))
            : new(TokenKind.Number, digits, start, value);
    }

    private static int Digits(string text, int position)
    {
        while (position < text.Length && char.IsAsciiDigit(text[position]))
            position++;
        return position;
    }

    private static int Exponent(string text, int position)
    {
        if (position >= text.Length || (text[position] != 'e' && text[position] != 'E'))
            return position;
        int digits = position + 1;
        if (digits < text.Length && (text[digits] == '+' || text[digits] == '-'))
            digits++;
        int end = Digits(text, digits);
        return end > digits ? end : position;
    }
}
