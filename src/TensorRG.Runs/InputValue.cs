using System.Globalization;
using System.Text.Json;
using System.Text.Json.Nodes;

namespace TensorRG.Runs;

/// <summary>
/// The value of a model parameter or a scheme option: a finite real, an integer, a text or a truth value. Two values
/// are equal when they are of the same kind and spell the same: <c>2</c> is not <c>2.0</c>, and <c>-0.0</c> is not
/// <c>0.0</c>, since they may lead to different bits.
/// </summary>
public sealed class InputValue : IEquatable<InputValue>
{
    private readonly object _value;

    private InputValue(object value)
    {
        _value = value;
    }

    /// <summary>A real value.</summary>
    /// <param name="value">A finite number.</param>
    /// <exception cref="ArgumentException">The number is not finite.</exception>
    public static implicit operator InputValue(double value) => FromDouble(value);

    /// <summary>An integer value.</summary>
    /// <param name="value">Any integer.</param>
    public static implicit operator InputValue(long value) => FromInt64(value);

    /// <summary>An integer value. Without this overload an <c>int</c> would silently become a real.</summary>
    /// <param name="value">Any integer.</param>
    public static implicit operator InputValue(int value) => FromInt64(value);

    /// <summary>A text value.</summary>
    /// <param name="value">Any text.</param>
    public static implicit operator InputValue(string value) => FromString(value);

    /// <summary>A truth value.</summary>
    /// <param name="value">True or false.</param>
    public static implicit operator InputValue(bool value) => FromBoolean(value);

    /// <summary>A real value.</summary>
    /// <param name="value">A finite number.</param>
    /// <exception cref="ArgumentException">The number is not finite.</exception>
    public static InputValue FromDouble(double value) => double.IsFinite(value)
        ? new InputValue(value)
        : throw new ArgumentException("A value must be finite.", nameof(value));

    /// <summary>An integer value.</summary>
    /// <param name="value">Any integer.</param>
    public static InputValue FromInt64(long value) => new(value);

    /// <summary>A text value.</summary>
    /// <param name="value">Any text.</param>
    public static InputValue FromString(string value)
    {
        ArgumentNullException.ThrowIfNull(value);
        return new InputValue(value);
    }

    /// <summary>A truth value.</summary>
    /// <param name="value">True or false.</param>
    public static InputValue FromBoolean(bool value) => new(value);

    /// <summary>The number, where the value is a real or an integer.</summary>
    /// <exception cref="InvalidOperationException">The value is no number.</exception>
    public double ToDouble() => _value switch
    {
        double real => real,
        long integer => integer,
        _ => throw new InvalidOperationException($"{this} is not a number."),
    };

    /// <summary>The integer.</summary>
    /// <exception cref="InvalidOperationException">The value is no integer.</exception>
    public long ToInt64() => _value is long integer
        ? integer
        : throw new InvalidOperationException($"{this} is not an integer.");

    /// <summary>The truth value.</summary>
    /// <exception cref="InvalidOperationException">The value is no truth value.</exception>
    public bool ToBoolean() => _value is bool truth
        ? truth
        : throw new InvalidOperationException($"{this} is neither true nor false.");

    /// <summary>The value as a person writes it, invariant: <c>2.0</c>, <c>3</c>, <c>periodic</c>, <c>true</c>.</summary>
    public override string ToString() => _value switch
    {
        double real => NumberText.Of(real),
        long integer => integer.ToString(CultureInfo.InvariantCulture),
        bool truth => truth ? "true" : "false",
        _ => (string)_value,
    };

    /// <summary>Same kind and same spelling.</summary>
    /// <param name="other">The value to compare with.</param>
    public bool Equals(InputValue? other) =>
        other is not null && _value.GetType() == other._value.GetType() && ToString() == other.ToString();

    /// <inheritdoc/>
    public override bool Equals(object? obj) => Equals(obj as InputValue);

    /// <inheritdoc/>
    public override int GetHashCode() => HashCode.Combine(_value.GetType(), ToString());

    internal JsonNode ToJson() => _value switch
    {
        double real => JsonValue.Create(real),
        long integer => JsonValue.Create(integer),
        bool truth => JsonValue.Create(truth),
        _ => JsonValue.Create((string)_value)!,
    };

    internal static InputValue FromJson(JsonNode? node) => node?.GetValueKind() switch
    {
        JsonValueKind.String => FromString(node.GetValue<string>()),
        JsonValueKind.True => FromBoolean(true),
        JsonValueKind.False => FromBoolean(false),
        JsonValueKind.Number => FromNumber(CanonicalJson.Number(node.AsValue())),
        _ => throw new FormatException("A parameter is neither number, text nor truth value."),
    };

    private static InputValue FromNumber(string text) => long.TryParse(text, CultureInfo.InvariantCulture, out long integer)
        ? FromInt64(integer)
        : FromDouble(double.Parse(text, CultureInfo.InvariantCulture));
}
