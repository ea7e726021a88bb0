namespace TensorRG.Models.Files.Expressions;

/// <summary>
/// Reads an expression by operator precedence (V. R. Pratt, POPL 1973). From loose to tight: or, and, not, comparisons
/// (which do not chain), + and -, * and /, the sign, ^ (from the right).
/// </summary>
internal sealed class Parser
{
    private const int NotPower = 3, ComparisonPower = 4, SignPower = 7, PowerPower = 8;

    private readonly TextSpot spot;
    private readonly Scope scope;
    private readonly HashSet<int> slots;
    private readonly List<Token> tokens;
    private readonly Operations make;
    private int next;
    private int depth;

    /// <summary>A parser of one expression.</summary>
    /// <param name="text">The expression.</param>
    /// <param name="spot">Where it stands.</param>
    /// <param name="scope">The names it may use.</param>
    /// <param name="slots">Takes the slots that it reads.</param>
    public Parser(string text, TextSpot spot, Scope scope, HashSet<int> slots)
    {
        (this.spot, this.scope, this.slots) = (spot, scope, slots);
        tokens = Lexer.Read(text, spot);
        make = new(text, spot);
    }

    private Token Current => tokens[next];

    /// <summary>The whole expression.</summary>
    /// <exception cref="ModelFileException">It is not well formed.</exception>
    public Operand Parse()
    {
        if (Current.Kind == TokenKind.End)
            throw spot.Error(0, "The expression is empty. Write one, such as \"-J*s_i*s_j\", or remove the key.");
        Operand root = Expression(0);
        return Current.Kind == TokenKind.End ? root : throw Unexpected();
    }

    private Operand Expression(int power)
    {
        if (++depth > Limits.ExpressionDepth)
            throw spot.Error(Current.Position, $"The expression is nested more than {Limits.ExpressionDepth} deep. Split it into several entries of [constants].");
        Operand left = Prefix();
        while (BindingPower(Current) is var binding and > 0 && binding > power)
        {
            Token symbol = tokens[next++];
            Operand right = Expression(binding == PowerPower ? binding - 1 : binding);
            left = make.Binary(symbol, left, right);
            if (binding == ComparisonPower && BindingPower(Current) == ComparisonPower)
                throw spot.Error(Current.Position, "Comparisons do not chain. Join two with 'and', such as a < b and b < c.");
        }
        depth--;
        return left;
    }

    private static int BindingPower(Token token) => token switch
    {
        { Kind: TokenKind.Name, Text: "or" } => 1,
        { Kind: TokenKind.Name, Text: "and" } => 2,
        { Kind: TokenKind.Symbol, Text: "==" or "!=" or "<" or "<=" or ">" or ">=" } => ComparisonPower,
        { Kind: TokenKind.Symbol, Text: "+" or "-" } => 5,
        { Kind: TokenKind.Symbol, Text: "*" or "/" } => 6,
        { Kind: TokenKind.Symbol, Text: "^" } => PowerPower,
        _ => 0,
    };

    private Operand Prefix()
    {
        Token token = tokens[next];
        if (token.Kind != TokenKind.End)
            next++;
        return token switch
        {
            { Kind: TokenKind.Number } => Operations.Constant(token.Position, token.Value),
            { Kind: TokenKind.Name, Text: "not" } => make.Not(token.Position, Expression(NotPower)),
            { Kind: TokenKind.Name } => Named(token),
            { Text: "-" } => make.Negative(token.Position, Expression(SignPower)),
            { Text: "+" } => Expression(SignPower),
            { Text: "(" } => Parenthesis(token),
            _ => throw Misplaced(token),
        };
    }

    private Operand Parenthesis(Token open)
    {
        Operand inside = Expression(0);
        Close(open);
        return inside with { Position = open.Position };
    }

    private void Close(Token open)
    {
        if (Current.Text == ")")
        {
            next++;
            return;
        }
        throw Current.Kind == TokenKind.End
            ? spot.Error(open.Position, "This parenthesis is not closed. Add ')'.")
            : Unexpected();
    }

    private Operand Named(Token name)
    {
        if (Current.Text == "(" && Current.Kind == TokenKind.Symbol)
            return Call(name);
        if (name.Text is "true" or "false")
            return new Operand(name.Position, 1, null, name.Text == "true" ? _ => true : _ => false);
        if (FunctionTable.Constants.TryGetValue(name.Text, out var value))
            return Operations.Constant(name.Position, value);
        if (scope.Slots.TryGetValue(name.Text, out int slot))
        {
            slots.Add(slot);
            return Operations.Slot(name.Position, slot);
        }
        throw FunctionTable.IsReserved(name.Text) ? Misplaced(name) : spot.Error(name.Position, $"There is no {SourceText.Quote(name.Text)} here. {scope.Remedy(name.Text)}");
    }

    private Operand Call(Token name)
    {
        Function? function = FunctionTable.Find(name.Text);
        if (function is null && name.Text is not ("if" or "near"))
            throw NoFunction(name);
        List<Operand> arguments = Arguments();
        return name.Text switch
        {
            "if" => make.If(name.Position, arguments),
            "near" => make.Near(name.Position, arguments),
            _ => make.Call(name.Position, function!, arguments),
        };
    }

    private ModelFileException NoFunction(Token name)
    {
        bool isValue = scope.Slots.ContainsKey(name.Text) || FunctionTable.Constants.ContainsKey(name.Text);
        string remedy = isValue
            ? "Put '*' between them for a product."
            : $"{NameSuggestion.Text(name.Text, FunctionTable.Names).Trim()} There are: {string.Join(", ", FunctionTable.Names)}.".Trim();
        return spot.Error(name.Position, isValue
            ? $"{SourceText.Quote(name.Text)} is no function, but a parenthesis follows it. {remedy}"
            : $"There is no function {SourceText.Quote(name.Text)}. {remedy}");
    }

    private List<Operand> Arguments()
    {
        Token open = tokens[next++];
        List<Operand> arguments = [];
        if (Current.Text != ")")
        {
            arguments.Add(Expression(0));
            while (Current.Text == "," && arguments.Count <= FunctionTable.MostArguments)
            {
                next++;
                arguments.Add(Expression(0));
            }
        }
        Close(open);
        return arguments;
    }

    private ModelFileException Misplaced(Token token) => token.Kind == TokenKind.End
        ? spot.Error(token.Position, "The expression ends where a value is needed. Complete it.")
        : spot.Error(token.Position, $"{SourceText.Quote(token.Text)} stands where a value is needed. {(token.Kind == TokenKind.Name ? "Functions take their arguments in parentheses." : "Put a number, a name or a parenthesis before it.")}");

    private ModelFileException Unexpected() => spot.Error(Current.Position, Current.Text switch
    {
        ")" => "This parenthesis closes none. Remove it, or open it with '('.",
        "," => "A comma stands outside the arguments of a function. Write decimals with a point.",
        _ => $"{SourceText.Quote(Current.Text)} follows a value without an operator. Put one between them, such as '*'.",
    });
}
